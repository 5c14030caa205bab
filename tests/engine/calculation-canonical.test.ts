import { createHash } from "node:crypto";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { canonicalText, normalisedText } from "@/lib/calculation/canonical";
import { definitionHash, materialHash, textHash } from "@/lib/calculation/hash";
import { suppliedMaterial, suppliedTemplate, wall } from "./calculation-fixtures";

describe("canonicalText", () => {
  it("writes the example of RFC 8785, section 3.2.2, as the RFC does", () => {
    const value = {
      numbers: [333333333.33333329, 1e30, 4.5, 2e-3, 0.000000000000000000000000001],
      string: '\u20ac$\u000f\nA\'B"\\\\"/',
      literals: [null, true, false],
    };
    expect(canonicalText(value)).toBe(
      '{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],"string":"€$\\u000f\\nA\'B\\"\\\\\\\\\\"/"}',
    );
  });

  it("orders members by UTF-16 units after RFC 8785, section 3.2.3 (a surrogate pair comes before U+FF21)", () => {
    const value = {
      "\u20ac": "5",
      "\r": "1",
      "\uff21": "7",
      "1": "2",
      "\ud83d\ude00": "6",
      "\u0080": "3",
      "\u00f6": "4",
    };
    expect(canonicalText(value).match(/(?<=:")\d/g)).toEqual(["1", "2", "3", "4", "5", "6", "7"]);
    expect(canonicalText({ b: 1, a: 2, B: 3 })).toBe('{"B":3,"a":2,"b":1}');
  });

  it("gives the same text whatever the line ends, composition and trailing blanks", () => {
    const stored = canonicalText({ working: "a = b  # café\nc = 2" });
    expect(canonicalText({ working: "a = b  # cafe\u0301  \r\nc = 2\t" })).toBe(stored);
  });

  it("refuses what JSON cannot hold", () => {
    expect(() => canonicalText({ a: NaN })).toThrow(TypeError);
    expect(() => canonicalText("\ud800")).toThrow(TypeError);
    expect(() => canonicalText({ a: () => 1 })).toThrow(TypeError);
  });

  it("does not depend on the order of members and survives reading back", () => {
    fc.assert(
      fc.property(fc.jsonValue(), (value) => {
        const text = (() => {
          try {
            return canonicalText(value);
          } catch (error) {
            if (error instanceof TypeError) return null;
            throw error;
          }
        })();
        fc.pre(text !== null);
        expect(canonicalText(JSON.parse(text!))).toBe(text);
      }),
    );
  });
});

describe("normalisedText", () => {
  it("keeps blanks at the beginning of lines", () => {
    expect(normalisedText("  a \r  b\u00a0\n")).toBe("  a\n  b\n");
  });
});

describe("hashes", () => {
  it("are SHA-256 of the canonical text", () => {
    const definition = wall();
    const expected = createHash("sha256").update(canonicalText(definition)).digest("hex");
    expect(definitionHash(definition)).toBe(expected);
    expect(textHash(canonicalText(definition))).toBe(expected);
  });

  it("change with any member of a definition or material", () => {
    expect(definitionHash(wall({ title: "Other" }))).not.toBe(definitionHash(wall()));
    const steel = suppliedMaterial("ss304");
    expect(materialHash({ ...steel, condition: "Cold worked" })).not.toBe(materialHash(steel));
  });

  it("are the same for a stored definition read back", () => {
    const definition = suppliedTemplate("furnace-lining");
    expect(textHash(canonicalText(JSON.parse(canonicalText(definition))))).toBe(definitionHash(definition));
  });
});
