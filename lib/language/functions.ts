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

export const languageFunctions: readonly FunctionRow[] = [
  { name: "sqrt", parameters: ["x"], rule: "root", degree: 2, cost: 1, help: "Square root." },
  {
    name: "cbrt",
    parameters: ["x"],
    rule: "root",
    degree: 3,
    cost: 1,
    help: "Cube root, also of negative numbers.",
  },
  { name: "exp", parameters: ["x"], rule: "dimensionless", cost: 1, help: "e to the power x." },
  { name: "ln", parameters: ["x"], rule: "dimensionless", cost: 1, help: "Natural logarithm." },
  { name: "log10", parameters: ["x"], rule: "dimensionless", cost: 1, help: "Logarithm to base 10." },
  {
    name: "sin",
    parameters: ["x"],
    rule: "dimensionless",
    cost: 1,
    help: 'Sine of an angle in radians; `"30 °"` is read as radians.',
  },
  { name: "cos", parameters: ["x"], rule: "dimensionless", cost: 1, help: "Cosine of an angle in radians." },
  { name: "tan", parameters: ["x"], rule: "dimensionless", cost: 1, help: "Tangent of an angle in radians." },
  {
    name: "asin",
    parameters: ["x"],
    rule: "dimensionless",
    cost: 1,
    help: "Angle in radians, −π/2 to π/2, whose sine is x.",
  },
  {
    name: "acos",
    parameters: ["x"],
    rule: "dimensionless",
    cost: 1,
    help: "Angle in radians, 0 to π, whose cosine is x.",
  },
  {
    name: "atan",
    parameters: ["x"],
    rule: "dimensionless",
    cost: 1,
    help: "Angle in radians, −π/2 to π/2, whose tangent is x.",
  },
  {
    name: "atan2",
    parameters: ["y", "x"],
    rule: "ratio",
    cost: 1,
    help: "Angle in radians of the point (x, y); x and y have one dimension.",
  },
  { name: "sinh", parameters: ["x"], rule: "dimensionless", cost: 1, help: "Hyperbolic sine." },
  { name: "cosh", parameters: ["x"], rule: "dimensionless", cost: 1, help: "Hyperbolic cosine." },
  { name: "tanh", parameters: ["x"], rule: "dimensionless", cost: 1, help: "Hyperbolic tangent." },
  { name: "asinh", parameters: ["x"], rule: "dimensionless", cost: 1, help: "Inverse hyperbolic sine." },
  {
    name: "acosh",
    parameters: ["x"],
    rule: "dimensionless",
    cost: 1,
    help: "Inverse hyperbolic cosine, x at least 1.",
  },
  {
    name: "atanh",
    parameters: ["x"],
    rule: "dimensionless",
    cost: 1,
    help: "Inverse hyperbolic tangent, x between −1 and 1.",
  },
  { name: "abs", parameters: ["x"], rule: "keep", cost: 1, help: "Magnitude." },
  { name: "sign", parameters: ["x"], rule: "sign", cost: 1, help: "−1, 0 or 1." },
  {
    name: "floor",
    parameters: ["x"],
    rule: "whole",
    cost: 1,
    help: "Largest whole number that is not above x.",
  },
  {
    name: "ceil",
    parameters: ["x"],
    rule: "whole",
    cost: 1,
    help: "Smallest whole number that is not below x.",
  },
  {
    name: "round",
    parameters: ["x"],
    rule: "whole",
    cost: 1,
    help: "Nearest whole number; a half is rounded away from 0.",
  },
  {
    name: "min",
    parameters: ["x"],
    variadic: true,
    rule: "alike",
    cost: 1,
    help: "Smallest of several values, element by element; of one list, its smallest element.",
  },
  {
    name: "max",
    parameters: ["x"],
    variadic: true,
    rule: "alike",
    cost: 1,
    help: "Largest of several values, element by element; of one list, its largest element.",
  },
  {
    name: "mean",
    parameters: ["x"],
    variadic: true,
    rule: "alike",
    cost: 1,
    help: "Arithmetic mean of several values, element by element; of one list, the mean of its elements.",
  },
  {
    name: "clamp",
    parameters: ["x", "low", "high"],
    rule: "clamp",
    cost: 1,
    help: "x, but not below low and not above high.",
  },
  {
    name: "interpolate",
    parameters: ["x", "xs", "ys"],
    rule: "interpolate",
    cost: 10,
    help: "Straight line between the points (xs, ys), xs rising; refuses x outside of them.",
  },
  {
    name: "erf",
    parameters: ["x"],
    rule: "dimensionless",
    cost: 10,
    help: "Error function.",
    source: `${dlmf}, 7.2.1`,
  },
  {
    name: "erfc",
    parameters: ["x"],
    rule: "dimensionless",
    cost: 10,
    help: "Complementary error function, 1 − erf(x), accurate where it is small.",
    source: `${dlmf}, 7.2.2`,
  },
  {
    name: "erfcx",
    parameters: ["x"],
    rule: "dimensionless",
    cost: 10,
    help: "Scaled complementary error function, exp(x²)·erfc(x), finite for large x.",
    source: `${dlmf}, 7.2.3 at z = ix`,
  },
  {
    name: "bessel_j",
    parameters: ["n", "x"],
    rule: "bessel",
    cost: 10,
    help: "Bessel function J of whole order n.",
    source: `${dlmf}, 10.2.2`,
  },
  {
    name: "bessel_y",
    parameters: ["n", "x"],
    rule: "bessel",
    cost: 10,
    help: "Bessel function Y of whole order n, x above 0.",
    source: `${dlmf}, 10.2.3`,
  },
  {
    name: "bessel_i",
    parameters: ["n", "x"],
    rule: "bessel",
    cost: 10,
    help: "Modified Bessel function I of whole order n.",
    source: `${dlmf}, 10.25.2`,
  },
  {
    name: "bessel_k",
    parameters: ["n", "x"],
    rule: "bessel",
    cost: 10,
    help: "Modified Bessel function K of whole order n, x above 0.",
    source: `${dlmf}, 10.25.3`,
  },
  {
    name: "bessel_ie",
    parameters: ["n", "x"],
    rule: "bessel",
    cost: 10,
    help: "Scaled function exp(−|x|)·I, finite for large x.",
    source: `${dlmf}, 10.25.2`,
  },
  {
    name: "bessel_ke",
    parameters: ["n", "x"],
    rule: "bessel",
    cost: 10,
    help: "Scaled function exp(x)·K, above 0 for large x.",
    source: `${dlmf}, 10.25.3`,
  },
  {
    name: "bessel_j_zero",
    parameters: ["n", "m"],
    rule: "bessel",
    cost: 10,
    help: "The m-th positive zero of the Bessel function J of order n, m from 1.",
    source: `${dlmf}, 10.21(i)`,
  },
  { name: "sum", parameters: ["list"], rule: "sum", cost: 1, help: "Sum of the elements." },
  {
    name: "cumsum",
    parameters: ["list"],
    rule: "cumsum",
    cost: 1,
    help: "Running sums: each element with all before it.",
  },
  {
    name: "product",
    parameters: ["list"],
    rule: "product",
    cost: 1,
    help: "Product of the elements, which are bare numbers.",
  },
  { name: "first", parameters: ["list"], rule: "element", cost: 1, help: "First element." },
  { name: "last", parameters: ["list"], rule: "element", cost: 1, help: "Last element." },
  { name: "at", parameters: ["list", "i"], rule: "at", cost: 1, help: "The i-th element, counted from 1." },
  { name: "count", parameters: ["list"], rule: "count", cost: 1, help: "Number of elements." },
  {
    name: "prepend",
    parameters: ["list", "value"],
    rule: "extend",
    cost: 1,
    help: "The list with the value before its first element.",
  },
  {
    name: "append",
    parameters: ["list", "value"],
    rule: "extend",
    cost: 1,
    help: "The list with the value after its last element.",
  },
  {
    name: "drop_first",
    parameters: ["list"],
    rule: "shorten",
    cost: 1,
    help: "The list without its first element.",
  },
  {
    name: "drop_last",
    parameters: ["list"],
    rule: "shorten",
    cost: 1,
    help: "The list without its last element.",
  },
  {
    name: "reverse",
    parameters: ["list"],
    rule: "reverse",
    cost: 1,
    help: "The list from its end to its beginning.",
  },
  {
    name: "weighted_mean",
    parameters: ["xs", "weights"],
    rule: "weighted-mean",
    cost: 1,
    help: "Sum of xs times weights divided by the sum of the weights.",
  },
  {
    name: "number_in",
    parameters: ["x", "unit"],
    rule: "number-in",
    cost: 1,
    help: 'The bare number of x in a unit, for empirical formulas: `number_in(T, "K")`.',
  },
  {
    name: "as_temperature",
    parameters: ["x"],
    rule: "as-temperature",
    cost: 0,
    help: "Declares that a value in kelvin is an absolute temperature.",
  },
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
