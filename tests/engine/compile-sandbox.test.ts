import { describe, expect, it } from "vitest";
import { checkProgram } from "@/lib/language";
import { compileProgram } from "@/lib/language/compile";
import { assertGenerated } from "@/lib/language/compile/identifiers";
import { languageFunctions } from "@/lib/language/functions";
import { isStructural } from "@/lib/language/runtime/list-functions";
import { isScalarFunction } from "@/lib/language/runtime/scalar";
import type { Typed, TypedProgram } from "@/lib/language/types";
import { sourceOf } from "./language-inputs";

const permitted = { functions: ["clamp"], methods: ["balance", "sqrt"], texts: ["k"] };

describe("the wall in front of `new Function`", () => {
  it("lets pass what the compiler writes", () => {
    const code =
      '"use strict";\nconst r1 = Math.sqrt(1.5e-7);\nreturn m0.value("k", r1, true) + clamp(r1, 0, 1) + X.balance(r1);';
    expect(() => assertGenerated(code, permitted)).not.toThrow();
  });

  it.each([
    "process.exit()",
    "globalThis",
    "r1.constructor",
    "r1.__proto__",
    'r1["constructor"]',
    "import('fs')",
    "eval(r1)",
    "this",
    "r1`x`",
    "'x'",
    '"\\u0063onstructor"',
    "rr1 = 2",
    "const clam = 1",
    "X.pow",
    "// remark é",
    "Function",
    "require",
  ])("refuses %s", (code) => {
    expect(() => assertGenerated(code, permitted)).toThrow(/not on the list/);
  });

  it("stops a typed tree that carries foreign names", () => {
    const { program } = checkProgram(sourceOf({ working: "y = sqrt(n)" }));
    if (!program) throw new Error("The working does not check.");
    const line = program.lines[0]!;
    const forged = (expression: Typed): TypedProgram => ({ ...program, lines: [{ ...line, expression }] });
    const { type, span } = line.expression;
    const call = {
      type,
      span,
      node: "call",
      function: "process.exit",
      arguments: [line.expression],
    } as const;
    expect(() => compileProgram(forged(call))).toThrow();
    const property: Typed = {
      type,
      span,
      node: "property",
      material: { from: "input", index: 0 },
      property: 'k", process.exit(), "' as "k",
      operation: "value",
      arguments: [line.expression],
    };
    expect(() => compileProgram(forged(property))).toThrow(/not on the list/);
  });

  it("never writes a name of the working into code: any symbol is only data", () => {
    const { program } = checkProgram(
      sourceOf({ working: "constructor_ = n\nF = constructor_*2\nX = F + 1" }),
    );
    if (!program) throw new Error("The working does not check.");
    const compiled = compileProgram(program);
    const frame = compiled.newFrame();
    frame.numbers.fill(4);
    compiled.run(frame);
    expect(frame.values).toEqual([4, 8, 9]);
  });
});

describe("every function of the language", () => {
  const lists = ["sum", "product", "cumsum", "weighted_mean", "interpolate"];
  const replaced = ["number_in", "as_temperature"];
  it.each(languageFunctions.map((row) => row.name).filter((name) => !replaced.includes(name)))(
    "%s has code",
    (name) => {
      expect(isScalarFunction(name) || isStructural(name) || lists.includes(name)).toBe(true);
    },
  );
});
