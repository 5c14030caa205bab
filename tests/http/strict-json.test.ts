import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { CodedError } from "@/lib/core/errors";
import { parseStrictJson } from "@/lib/http/strict-json";

function refusal(text: string): CodedError {
  try {
    parseStrictJson(text);
  } catch (error) {
    if (error instanceof CodedError) return error;
    throw error;
  }
  throw new Error(`${text} was read`);
}

describe("reading JSON strictly", () => {
  it.each([
    ['{"t": 1, "t": 2}', "“t”"],
    ['{"inputs": {"t": 1, "k": 2, "\\u0074": 3}}', "“t”"],
    ['[{"a": 1}, {"a": 1, "b": {"a": 1}, "a": 2}]', "“a”"],
    ['{"a\\"": 1, "a\\"": 2}', '“a"'],
  ])("names the member that stands twice in %s", (text, named) => {
    expect(refusal(text)).toMatchObject({ code: "malformed-json" });
    expect(refusal(text).message).toContain(named);
  });

  it("reads the same name in two different objects", () => {
    expect(parseStrictJson('{"a": {"t": 1}, "b": {"t": 1, "u": "x:{\\"t\\":1}"}}')).toEqual({
      a: { t: 1 },
      b: { t: 1, u: 'x:{"t":1}' },
    });
  });

  it("refuses a number beyond a double, with its place", () => {
    expect(refusal('{"inputs": {"t": 1e999}}').message).toContain("#/inputs/t");
  });

  it.each(['{"t": "\\ud800"}', '{"\\udc00": 1}', '["\\ud83d x"]'])(
    "refuses half a surrogate pair in %s",
    (text) => {
      expect(refusal(text)).toMatchObject({ code: "malformed-json" });
    },
  );

  it("reads a whole surrogate pair", () => {
    expect(parseStrictJson('["\\ud83d\\ude00"]')).toEqual(["😀"]);
  });

  it("says at which line and column a text breaks off", () => {
    expect(refusal('{"t": 1,\n "k" 2}').message).toMatch(/line 2, column 6/);
  });

  it.each(["", "{", "nul", "{'t': 1}", "[1,]", "NaN", "Infinity", "{t: 1}", "\u00a01"])(
    "refuses %j",
    (text) => {
      expect(refusal(text)).toMatchObject({ code: "malformed-json" });
    },
  );

  it("refuses what is nested too deeply instead of running out of stack", () => {
    expect(refusal("[".repeat(100) + "]".repeat(100)).message).toContain("deeper");
    expect(refusal("[".repeat(400_000) + "]".repeat(400_000))).toMatchObject({ code: "malformed-json" });
  });

  it("refuses a member called __proto__", () => {
    expect(refusal('{"inputs": {"__proto__": {"t": 1}}}')).toMatchObject({ code: "unknown-member" });
  });

  it("reads every value that JSON can hold as JSON.parse does", () => {
    fc.assert(
      fc.property(fc.json({ maxDepth: 6 }), (text) => {
        fc.pre(!text.includes("__proto__"));
        expect(parseStrictJson(text)).toEqual(JSON.parse(text));
      }),
    );
  });

  it("finds a member that was doubled anywhere in a random object", () => {
    fc.assert(
      fc.property(fc.dictionary(fc.string(), fc.json(), { minKeys: 1 }), (members) => {
        fc.pre(!JSON.stringify(members).includes("__proto__"));
        const written = Object.entries(members).map(([name, value]) => `${JSON.stringify(name)}:${value}`);
        expect(refusal(`{${[...written, written[0]].join(",")}}`).code).toBe("malformed-json");
      }),
    );
  });
});
