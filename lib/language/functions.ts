/**
 * The functions and constants of the language as data: checker, compiler, completion and help page read these rows.
 * The checker types a call by its row's `rule`; the compiler looks the implementation up by `name`.
 */

/**
 * How a function passes types. Element by element means: a list argument gives a list, numbers spread over it.
 * - `dimensionless`: bare numbers in and out, element by element
 * - `whole`: likewise; a separate rule because rounding a dimension would depend on the unit
 * - `root`: dimension to the power 1/degree, element by element
 * - `keep`: dimension and temperature reading kept, element by element
 * - `sign`: any dimension in, bare number out, element by element
 * - `ratio`: two arguments of one dimension, bare number out, element by element
 * - `alike`: arguments of one dimension and reading, which the result keeps; one list alone is reduced to a number
 * - `clamp`: three arguments of one dimension and reading, element by element
 * - `interpolate`: x alike with xs, result alike with ys
 * - `bessel`: order a whole constant, bare number in and out, element by element
 * - `sum`, `cumsum`, `product`, `element`, `at`, `count`, `extend`, `shorten`, `reverse`, `weighted-mean`: lists
 * - `number-in`, `as-temperature`: replaced by the checker, never called at run time
 */
export type TypeRule =
  | "dimensionless"
  | "whole"
  | "root"
  | "keep"
  | "sign"
  | "ratio"
  | "alike"
  | "clamp"
  | "interpolate"
  | "bessel"
  | "sum"
  | "cumsum"
  | "product"
  | "element"
  | "at"
  | "count"
  | "extend"
  | "shorten"
  | "reverse"
  | "weighted-mean"
  | "number-in"
  | "as-temperature";

export interface FunctionRow {
  readonly name: string;
  readonly parameters: readonly string[];
  /** The last parameter may be repeated. */
  readonly variadic?: true;
  readonly rule: TypeRule;
  /** Root taken, for the rule `root`. */
  readonly degree?: 2 | 3;
  /** Fuel of one evaluation (per element on lists). */
  readonly cost: number;
  readonly help: string;
  /** Definition that the implementation follows, where it is more than the elementary one. */
  readonly source?: string;
}

const dlmf = "NIST Digital Library of Mathematical Functions";

function row(
  name: string,
  parameters: readonly string[],
  rule: TypeRule,
  cost: number,
  help: string,
  more: Pick<FunctionRow, "variadic" | "degree" | "source"> = {},
): FunctionRow {
  return { name, parameters, rule, cost, help, ...more };
}

export const languageFunctions: readonly FunctionRow[] = [
  row("sqrt", ["x"], "root", 1, "Square root.", { degree: 2 }),
  row("cbrt", ["x"], "root", 1, "Cube root, also of negative numbers.", { degree: 3 }),
  row("exp", ["x"], "dimensionless", 1, "e to the power x."),
  row("ln", ["x"], "dimensionless", 1, "Natural logarithm."),
  row("log10", ["x"], "dimensionless", 1, "Logarithm to base 10."),
  row("sin", ["x"], "dimensionless", 1, 'Sine of an angle in radians; `"30 °"` is read as radians.'),
  row("cos", ["x"], "dimensionless", 1, "Cosine of an angle in radians."),
  row("tan", ["x"], "dimensionless", 1, "Tangent of an angle in radians."),
  row("asin", ["x"], "dimensionless", 1, "Angle in radians, −π/2 to π/2, whose sine is x."),
  row("acos", ["x"], "dimensionless", 1, "Angle in radians, 0 to π, whose cosine is x."),
  row("atan", ["x"], "dimensionless", 1, "Angle in radians, −π/2 to π/2, whose tangent is x."),
  row("atan2", ["y", "x"], "ratio", 1, "Angle in radians of the point (x, y); x and y have one dimension."),
  row("sinh", ["x"], "dimensionless", 1, "Hyperbolic sine."),
  row("cosh", ["x"], "dimensionless", 1, "Hyperbolic cosine."),
  row("tanh", ["x"], "dimensionless", 1, "Hyperbolic tangent."),
  row("asinh", ["x"], "dimensionless", 1, "Inverse hyperbolic sine."),
  row("acosh", ["x"], "dimensionless", 1, "Inverse hyperbolic cosine, x at least 1."),
  row("atanh", ["x"], "dimensionless", 1, "Inverse hyperbolic tangent, x between −1 and 1."),
  row("abs", ["x"], "keep", 1, "Magnitude."),
  row("sign", ["x"], "sign", 1, "−1, 0 or 1."),
  row("floor", ["x"], "whole", 1, "Largest whole number that is not above x."),
  row("ceil", ["x"], "whole", 1, "Smallest whole number that is not below x."),
  row("round", ["x"], "whole", 1, "Nearest whole number; a half is rounded away from 0."),
  row(
    "min",
    ["x"],
    "alike",
    1,
    "Smallest of several values, element by element; of one list, its smallest element.",
    { variadic: true },
  ),
  row(
    "max",
    ["x"],
    "alike",
    1,
    "Largest of several values, element by element; of one list, its largest element.",
    { variadic: true },
  ),
  row(
    "mean",
    ["x"],
    "alike",
    1,
    "Arithmetic mean of several values, element by element; of one list, the mean of its elements.",
    { variadic: true },
  ),
  row("clamp", ["x", "low", "high"], "clamp", 1, "x, but not below low and not above high."),
  row(
    "interpolate",
    ["x", "xs", "ys"],
    "interpolate",
    10,
    "Straight line between the points (xs, ys), xs rising; refuses x outside of them.",
  ),
  row("erf", ["x"], "dimensionless", 10, "Error function.", { source: `${dlmf}, 7.2.1` }),
  row(
    "erfc",
    ["x"],
    "dimensionless",
    10,
    "Complementary error function, 1 − erf(x), accurate where it is small.",
    { source: `${dlmf}, 7.2.2` },
  ),
  row(
    "erfcx",
    ["x"],
    "dimensionless",
    10,
    "Scaled complementary error function, exp(x²)·erfc(x), finite for large x.",
    { source: `${dlmf}, 7.2.3 at z = ix` },
  ),
  row("bessel_j", ["n", "x"], "bessel", 10, "Bessel function J of whole order n.", {
    source: `${dlmf}, 10.2.2`,
  }),
  row("bessel_y", ["n", "x"], "bessel", 10, "Bessel function Y of whole order n, x above 0.", {
    source: `${dlmf}, 10.2.3`,
  }),
  row("bessel_i", ["n", "x"], "bessel", 10, "Modified Bessel function I of whole order n.", {
    source: `${dlmf}, 10.25.2`,
  }),
  row("bessel_k", ["n", "x"], "bessel", 10, "Modified Bessel function K of whole order n, x above 0.", {
    source: `${dlmf}, 10.25.3`,
  }),
  row("bessel_ie", ["n", "x"], "bessel", 10, "Scaled function exp(−|x|)·I, finite for large x.", {
    source: `${dlmf}, 10.25.2`,
  }),
  row("bessel_ke", ["n", "x"], "bessel", 10, "Scaled function exp(x)·K, above 0 for large x.", {
    source: `${dlmf}, 10.25.3`,
  }),
  row(
    "bessel_j_zero",
    ["n", "m"],
    "bessel",
    10,
    "The m-th positive zero of the Bessel function J of order n, m from 1.",
    { source: `${dlmf}, 10.21(i)` },
  ),
  row("sum", ["list"], "sum", 1, "Sum of the elements."),
  row("cumsum", ["list"], "cumsum", 1, "Running sums: each element with all before it."),
  row("product", ["list"], "product", 1, "Product of the elements, which are bare numbers."),
  row("first", ["list"], "element", 1, "First element."),
  row("last", ["list"], "element", 1, "Last element."),
  row("at", ["list", "i"], "at", 1, "The i-th element, counted from 1."),
  row("count", ["list"], "count", 1, "Number of elements."),
  row("prepend", ["list", "value"], "extend", 1, "The list with the value before its first element."),
  row("append", ["list", "value"], "extend", 1, "The list with the value after its last element."),
  row("drop_first", ["list"], "shorten", 1, "The list without its first element."),
  row("drop_last", ["list"], "shorten", 1, "The list without its last element."),
  row("reverse", ["list"], "reverse", 1, "The list from its end to its beginning."),
  row(
    "weighted_mean",
    ["xs", "weights"],
    "weighted-mean",
    1,
    "Sum of xs times weights divided by the sum of the weights.",
  ),
  row(
    "number_in",
    ["x", "unit"],
    "number-in",
    1,
    'The bare number of x in a unit, for empirical formulas: `number_in(T, "K")`.',
  ),
  row(
    "as_temperature",
    ["x"],
    "as-temperature",
    0,
    "Declares that a value in kelvin is an absolute temperature.",
  ),
];

export type SpecialFormName = "balance" | "argmin" | "integral" | "series" | "fixed_point";

export interface SpecialFormRow {
  readonly name: SpecialFormName;
  /** The first is the bound variable, the last the expression in it. */
  readonly parameters: readonly string[];
  readonly help: string;
}

export const specialForms: readonly SpecialFormRow[] = [
  {
    name: "balance",
    parameters: ["x", "lo", "hi", "expr"],
    help: "The x between lo and hi at which expr is zero.",
  },
  {
    name: "argmin",
    parameters: ["x", "lo", "hi", "expr"],
    help: "The x between lo and hi, both included, at which expr is smallest.",
  },
  { name: "integral", parameters: ["x", "lo", "hi", "expr"], help: "Integral of expr over x from lo to hi." },
  {
    name: "series",
    parameters: ["n", "from", "to", "expr"],
    help: "Sum of expr over the whole numbers n; 0 when to lies below from.",
  },
  {
    name: "fixed_point",
    parameters: ["x", "start", "expr"],
    help: "The x, number or list, that expr gives back, sought from start.",
  },
];

export interface ConstantRow {
  readonly name: string;
  /** SI. */
  readonly value: number;
  /** SI unit as a text that `parseUnit` reads. */
  readonly unit: string;
  readonly help: string;
  readonly source: string;
}

const codata = "CODATA 2022";

export const languageConstants: readonly ConstantRow[] = [
  {
    name: "pi",
    value: Math.PI,
    unit: "1",
    help: "Ratio of circumference to diameter",
    source: "mathematics",
  },
  // 2·π⁵·k⁴/(15·h³·c²) from the exact constants; CODATA prints 5.670374419…e-8.
  {
    name: "sigma_SB",
    value: 5.670374419184429e-8,
    unit: "W/(m²·K⁴)",
    help: "Stefan-Boltzmann constant",
    source: codata,
  },
  { name: "k_B", value: 1.380649e-23, unit: "J/K", help: "Boltzmann constant", source: codata },
  { name: "e_charge", value: 1.602176634e-19, unit: "C", help: "Elementary charge", source: codata },
  { name: "N_A", value: 6.02214076e23, unit: "1/mol", help: "Avogadro constant", source: codata },
  // N_A·k_B, exact.
  { name: "R_gas", value: 8.31446261815324, unit: "J/(mol·K)", help: "Molar gas constant", source: codata },
  { name: "h_planck", value: 6.62607015e-34, unit: "J·s", help: "Planck constant", source: codata },
  { name: "c_0", value: 299792458, unit: "m/s", help: "Speed of light in vacuum", source: codata },
  { name: "g_n", value: 9.80665, unit: "m/s²", help: "Standard acceleration of free fall", source: codata },
  {
    name: "T_ice",
    value: 273.15,
    unit: "K",
    help: "Ice point, 0 °C, an absolute temperature",
    source: "ISO 80000-5",
  },
];

/** Words of the grammar, which no symbol may be called. */
export const reservedWords: readonly string[] = ["and", "or", "not", "true", "false"];
