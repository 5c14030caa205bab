import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { checkProgram, languageFunctions, limits, parseExpression, specialForms } from "@/lib/language";
import { sourceOf, usualInputs } from "./language-inputs";

const check = (working: string) => checkProgram(sourceOf({ working }));

/** First error of a working, as line, code and whether its sentence names the limit. */
function refusal(working: string): { line: number | undefined; code: string | undefined; message: string } {
  const { diagnostics, program } = check(working);
  expect(program).toBeNull();
  const error = diagnostics.find((diagnostic) => diagnostic.severity === "error");
  return { line: error?.line, code: error?.code, message: error?.message ?? "" };
}

const doublings = (count: number) =>
  [
    "f0(x) = x*1.5 + 1",
    ...Array.from({ length: count }, (_, i) => `f${i + 1}(x) = f${i}(f${i}(x))`),
    `y = f${count}(n)`,
  ].join("\n");

/** Every level calls the one below with as many different dimensions as there are base units. */
const dimensionsMultiplied = (levels: number) =>
  [
    "g0(x) = x",
    ...Array.from(
      { length: levels },
      (_, i) =>
        `g${i + 1}(x) = 0*(${["L", "n", "q", "k", '"1 kg"', '"1 s"', '"1 EUR"', '"1 A"']
          .map((unit) => `number_in(g${i}(x*${unit})/g${i}(x*${unit}), "1")`)
          .join("+")})`,
    ),
    `y = g${levels}(n)`,
  ].join("\n");

describe("hostile workings get a diagnostic that names line and limit", () => {
  it.each([
    ["80 kB of dots", `y = ${"a.".repeat(40_000)}a`, 1, "too-long", "20000"],
    ["a long line of dots", `y = ${"a.".repeat(900)}a`, 1, "too-many-words", "800"],
    ["1,900 dots", `y = a${".".repeat(700)}`, 1, "missing-member", ""],
    ["800 brackets", `a = 1\ny = ${"(".repeat(390)}1${")".repeat(390)}`, 2, "too-deep", "50"],
    ["800 brackets, not closed", `y = ${"(".repeat(790)}`, 1, "too-deep", "50"],
    ["a line of 2,001 characters", `a = 1\ny = 1 + ${" ".repeat(2000)}1`, 2, "line-too-long", "2000"],
    [
      "a long statement over many lines",
      `y = (1\n${"+ 1234567890123456789012345678901234567890\n".repeat(60)})`,
      1,
      "line-too-long",
      "2000",
    ],
    ["21 signs in a row", `y = ${"-".repeat(21)}1`, 1, "too-many-signs", "20"],
    ["20 nots in a row", `y = ${"not ".repeat(30)}1`, 1, "too-many-signs", "20"],
    ["a name of 65 letters", `y = ${"a".repeat(65)}`, 1, "name-too-long", "64"],
    ["301 lines", "a = 1\n".repeat(301), 301, "too-many-lines", "300"],
    ["40 doublings", doublings(40), 42, "too-many-nodes", "20000"],
    ["a comment without end", `y = 1 # ${"x".repeat(3000)}`, 1, "line-too-long", "2000"],
    ["an endless block comment", `y = 1 /* ${"x\n".repeat(200)}`, 1, "foreign-comment", ""],
    ["four special forms in each other", `y = ${nested(4)}`, 1, "forms-too-deep", "3"],
    ["a dimension that explodes", `f(x) = x^100\ny = f(f(L))`, 1, "dimension-limit", "1000"],
  ])("%s", (_, working, line, code, limit) => {
    const found = refusal(working);
    expect(found).toMatchObject({ line, code });
    expect(found.message).toContain(limit);
  });

  it("three special forms in each other are allowed, through functions as well", () => {
    expect(check(`y = ${nested(3)}`).program).not.toBeNull();
    expect(refusal(`f(x) = ${nested(3).replace("1", "x")}\ny = integral(v, 0, 1, f(v))`).code).toBe(
      "forms-too-deep",
    );
  });

  it("remembers functions, so that their types are not multiplied without end", () => {
    expect(refusal(dimensionsMultiplied(12)).code).toBe("too-many-nodes");
  });

  it("functions that call each other 290 deep are refused, not a stack overflow", () => {
    const body = "+1".repeat(25);
    const chain = [
      "f0(x) = x",
      ...Array.from({ length: 280 }, (_, i) => `f${i + 1}(x) = f${i}(x)${body}`),
      "y = f280(n)",
    ];
    expect(refusal(chain.join("\n")).code).toBe("too-deep");
  });

  it("the longest sums, powers and branches that are allowed check", () => {
    expect(check(`y = ${"n+".repeat(395)}n`).program).not.toBeNull();
    expect(check(`y = ${"n^".repeat(395)}n`).program).not.toBeNull();
    expect(check(`y = ${"n > 1 ? 1 : ".repeat(130)}2`).program).not.toBeNull();
  });

  it.each([
    "constructor",
    "__proto__",
    "toString",
    "hasOwnProperty",
    "prototype",
    "valueOf",
    "__defineGetter__",
  ])("%s is no way into JavaScript", (name) => {
    for (const working of [
      `y = ${name}`,
      `y = ${name}(1)`,
      `y = L.${name}`,
      `y = tip.${name}`,
      `y = layers.${name}`,
      `y = wall.${name}(T1)`,
      `y = layers.finish.${name}`,
      `y = tip == "${name}" ? 1 : 2`,
      `${name} = 1`,
      `f(${name}) = ${name}\ny = f(1)`,
      `y = series(${name}, 1, 2, ${name})`,
      `y = number_in(L, "${name}")`,
      `y = "1 ${name}"`,
    ])
      expect(check(working).program, working).toBeNull();
  });

  it.each([
    "y = n\u202e + 1",
    "y = n\u2066+1",
    "y\u200b = 1",
    "y = \ud800",
    "\ufeffy = 1",
    "y = ｎ",
    "y = n\u2028z = 1",
    "y = \u0000",
  ])("%j is refused where the foreign character stands", (working) => {
    const { diagnostics, program } = check(working);
    expect(program).toBeNull();
    expect(diagnostics[0]).toMatchObject({ line: 1, severity: "error" });
  });
});

function nested(depth: number): string {
  let text = "1";
  for (let i = 0; i < depth; i++) text = `integral(v${i}, 0, 1, ${text})`;
  return text;
}

describe("whatever is typed", () => {
  const settings = { numRuns: 400 };

  it("random text never throws, and its places lie in it", () => {
    fc.assert(
      fc.property(fc.string({ unit: "binary", maxLength: 200 }), (text) => {
        parseExpression(text);
        placesLieIn(text);
      }),
      settings,
    );
  });

  const words = fc.constantFrom(
    ...usualInputs.map((input) => input.symbol),
    ...languageFunctions.map((row) => row.name),
    ...specialForms.map((row) => row.name),
    ..."a b f x = = == != < > <= >= + - * / ^ ( ) ( ) ( ) , , . ? : and or not 0 1 2.5 1e9 # \n \n".split(
      " ",
    ),
    '"25 mm"',
    '"60 °C"',
    '"bare"',
    ".t",
    ".T",
    ".k(T1)",
    "pi",
    "layers.finish.e",
  );

  it("random soups of words never throw, and a program has no error", () => {
    fc.assert(
      fc.property(fc.array(words, { maxLength: 60 }), (soup) => {
        placesLieIn(`y = ${soup.join(" ")}`);
      }),
      { numRuns: 1500 },
    );
  });

  const leaf = fc.constantFrom(
    "n",
    "L",
    "q",
    "T1",
    "dT",
    "layers.t",
    "layers.T",
    "2",
    "0",
    "tip.e",
    "wall.k(T1)",
    '"5 mm"',
  );
  const { tree } = fc.letrec<{ tree: string }>((tie) => ({
    tree: fc.oneof(
      { maxDepth: 6 },
      leaf,
      fc
        .tuple(tie("tree"), fc.constantFrom("+", "-", "*", "/", "^"), tie("tree"))
        .map(([a, sign, b]) => `(${a} ${sign} ${b})`),
      fc
        .tuple(fc.constantFrom(...languageFunctions), tie("tree"), tie("tree"), tie("tree"))
        .map(([row, ...all]) => {
          return `${row.name}(${all.slice(0, row.parameters.length).join(", ")})`;
        }),
      fc.tuple(tie("tree"), tie("tree"), tie("tree")).map(([a, b, c]) => `(${a} > ${b} ? ${b} : ${c})`),
    ),
  }));

  it("well-formed expressions of any types never throw", () => {
    fc.assert(
      fc.property(tree, (text) => {
        if (text.length < limits.lineCharacters - 10) placesLieIn(`y = ${text}`);
      }),
      settings,
    );
  });
});

function placesLieIn(working: string): void {
  const { diagnostics, program } = check(working);
  const errors = diagnostics.filter((diagnostic) => diagnostic.severity === "error");
  expect(program === null).toBe(errors.length > 0);
  const lines = working.split("\n");
  for (const { path, line, column, endColumn, endLine } of diagnostics) {
    if (path !== "#/working" || line === undefined) continue;
    expect(column).toBeGreaterThanOrEqual(1);
    expect(endColumn).toBeGreaterThanOrEqual(line === endLine ? (column ?? 0) : 1);
    expect(line).toBeLessThanOrEqual(lines.length);
  }
}
