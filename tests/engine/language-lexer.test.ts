import { describe, expect, it } from "vitest";
import { Findings, workingPath } from "@/lib/language/diagnostics";
import { lex } from "@/lib/language/lexer";

function words(source: string) {
  const findings = new Findings(workingPath);
  const tokens = lex(source, findings);
  return {
    words: tokens.filter((token) => token.kind !== "newline").map((token) => `${token.kind} ${token.text}`),
    found: findings.diagnostics.map(
      ({ line, column, endColumn, code, mend }) =>
        `${line}:${column}-${endColumn} ${code}${mend ? ` → ${mend.text}` : ""}`,
    ),
    tokens,
  };
}

describe("lexer", () => {
  it("cuts a line into names, numbers, texts and signs", () => {
    expect(words('q = 1.5e-3*k.t(T_1, "25 mm") # note').words).toEqual([
      "name q",
      "assign =",
      "number 1.5e-3",
      "operator *",
      "name k",
      "dot .",
      "name t",
      "open (",
      "name T_1",
      "comma ,",
      "text 25 mm",
      "close )",
      "comment note",
    ]);
  });

  it("counts lines and columns from 1, ends exclusive, also after CRLF", () => {
    const { tokens } = words("a = 1\r\n  bc = a");
    expect(tokens.filter((token) => token.text === "bc")).toMatchObject([
      { line: 2, column: 3, endColumn: 5 },
    ]);
  });

  it("takes comparison signs whole", () => {
    expect(words("a<=b>=c==d!=e<f>g").words.filter((word) => word.startsWith("operator"))).toEqual([
      "operator <=",
      "operator >=",
      "operator ==",
      "operator !=",
      "operator <",
      "operator >",
    ]);
  });

  it("leaves a # inside quotes alone and reads and, or, not as signs", () => {
    expect(words('"a # b" and not c or d').words).toEqual([
      "text a # b",
      "operator and",
      "operator not",
      "name c",
      "operator or",
      "name d",
    ]);
  });

  it.each([
    ["x = a × b", "1:7-8 unknown-sign → *"],
    ["x = a · b", "1:7-8 unknown-sign → *"],
    ["x = a • b", "1:7-8 unknown-sign → *"],
    ["x = a − b", "1:7-8 unknown-sign → -"],
    ["x = a²", "1:6-7 unknown-sign → ^2"],
    ["x = a ** b", "1:7-9 unknown-sign → ^"],
    ["x = a || b", "1:7-9 unknown-sign → or"],
    ["x = a && b", "1:7-9 unknown-sign → and"],
    ["x = a ≤ b", "1:7-8 unknown-sign → <="],
    ["x = a <> b", "1:7-9 unknown-sign → !="],
    ["x = a === b", "1:7-10 unknown-sign → =="],
    ["x := a", "1:3-5 unknown-sign → ="],
    ["x = 'a'", '1:5-8 foreign-quotes → "a"'],
    ["x = “25 mm”", '1:5-12 foreign-quotes → "25 mm"'],
    ["x = λ", "1:5-6 foreign-letter → lambda"],
    ["x = σ*π", "1:5-6 foreign-letter → sigma"],
    ["x = a;", "1:6-7 unknown-sign"],
    ["x = [1]", "1:5-6 unknown-sign"],
    ["x = 5!", "1:6-7 unknown-sign"],
    ["x = a % b", "1:7-8 unknown-sign"],
    ["x = 0x1F", "1:5-9 foreign-number"],
    ["x = 0b101", "1:5-10 foreign-number"],
    ["x = 1e400", "1:5-10 number-too-large"],
    ["x = a // b", "1:7-9 foreign-comment"],
    ["x = a /* b */", "1:7-9 foreign-comment"],
    ['x = "25 mm', "1:5-11 open-text"],
    ['x = "a\\"', "1:5-9 unreadable-text"],
    ["x = a\u200bb", "1:6-7 unknown-sign → "],
    ["x = a\u202eb", "1:6-7 unknown-sign → "],
    ["x = Т", "1:5-6 foreign-letter"], // Cyrillic
    ["_x = 1", "1:1-2 unknown-sign"],
  ])("refuses %j with its place and what is meant", (source, expected) => {
    expect(words(source).found[0]).toBe(expected);
  });

  it("names an invisible character by its number", () => {
    const findings = new Findings(workingPath);
    lex("a = b\u202e", findings);
    expect(findings.diagnostics[0]?.message).toBe(
      "Line 1: there is an invisible character here (U+202E). Delete it.",
    );
  });

  it("reads a no-break space as a blank", () => {
    expect(words("a\u00a0= 1").found).toEqual([]);
  });
});
