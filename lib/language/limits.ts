/** Limits of a working. They are checked before the grammar package sees a text: its parser is quadratic and recursive. */
export const limits = {
  workingCharacters: 20_000,
  workingLines: 300,
  lineCharacters: 2_000,
  lineTokens: 800,
  bracketDepth: 50,
  signsInARow: 20,
  nameCharacters: 64,
  dotsInAName: 2,
  /** Nodes of the checked program after functions are expanded. */
  nodes: 20_000,
  /** Levels of the syntax tree, through the functions that call each other. */
  depth: 1_000,
  specialFormDepth: 3,
  /** Highest order of a Bessel function: it costs time in proportion. */
  besselOrder: 100,
  /** Largest numerator or denominator of an exponent of a dimension. */
  exponent: 1_000,
} as const;
