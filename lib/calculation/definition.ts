import { z } from "zod";
import { propertyNames } from "@/lib/language/types";

/**
 * A template's definition: the unit of import, export, hashing and diffing. An issued definition never changes, so
 * every member that a later part of the product reads is in the schema from the beginning.
 */

export const symbolPattern = /^[A-Za-z][A-Za-z0-9_]{0,63}$/;
export const slugPattern = /^[a-z0-9]+(?:-[a-z0-9]+)*$/;

export const Symbol_ = z
  .string()
  .regex(symbolPattern, "Starts with a letter, then letters, digits and _, at most 64.");
export const Slug = z.string().max(64).regex(slugPattern, "Small letters, digits and single hyphens.");

const Label = z.string().trim().min(1).max(160);
const Sentence = z.string().trim().min(1).max(600);
const UnitText = z.string().min(1).max(48);
const QuantityName = z.string().min(1).max(64);
const Condition = z.string().min(1).max(2000);
const Finite = z.number().refine(Number.isFinite, "A finite number.");

const DefaultUncertainty = z.strictObject({
  standard: Finite.nonnegative().optional(),
  halfWidth: Finite.nonnegative().optional(),
  distribution: z.enum(["normal", "uniform", "triangular"]).default("normal"),
  unit: UnitText.optional(),
});

/** A number with bounds in its declared unit. `min`/`max` include their value, `above`/`below` exclude it. */
const numberMembers = {
  kind: z.literal("number"),
  symbol: Symbol_,
  label: Label,
  quantity: QuantityName,
  unit: UnitText,
  default: Finite.optional(),
  min: Finite.optional(),
  max: Finite.optional(),
  above: Finite.optional(),
  below: Finite.optional(),
  usualMin: Finite.optional(),
  usualMax: Finite.optional(),
  uncertainty: DefaultUncertainty.optional(),
  note: z.string().max(400).optional(),
};

const Option = z.strictObject({
  key: Symbol_,
  label: Label,
  values: z.record(Symbol_, z.strictObject({ value: Finite, unit: UnitText })).optional(),
});

const choiceMembers = {
  kind: z.literal("choice"),
  symbol: Symbol_,
  label: Label,
  options: z.array(Option).min(2).max(60),
  default: Symbol_.optional(),
  note: z.string().max(400).optional(),
};

/** A number with unit in place of a material: a property that does not vary. */
export const ConstantProperty = z.strictObject({
  value: Finite,
  unit: UnitText,
  at: z.strictObject({ value: Finite, unit: UnitText }).optional(),
});

const materialMembers = {
  kind: z.literal("material"),
  symbol: Symbol_,
  label: Label,
  needs: z.array(z.enum(propertyNames)).min(1).max(8),
  orConstant: z.boolean().optional(),
  default: Slug.optional(),
  note: z.string().max(400).optional(),
};

export const NumberColumn = z.strictObject(numberMembers);
export const ChoiceColumn = z.strictObject(choiceMembers);
export const MaterialColumn = z.strictObject(materialMembers);
export const TextColumn = z.strictObject({
  kind: z.literal("text"),
  symbol: Symbol_,
  label: Label,
  maxLength: z.number().int().min(1).max(200).default(80),
});
export const Column = z.discriminatedUnion("kind", [NumberColumn, ChoiceColumn, MaterialColumn, TextColumn]);

const inputExtras = { appliesWhen: Condition.optional(), mustType: z.boolean().optional() };

export const NumberInput = z.strictObject({ ...numberMembers, ...inputExtras });
export const ChoiceInput = z.strictObject({ ...choiceMembers, ...inputExtras });
export const MaterialInput = z.strictObject({
  ...materialMembers,
  ...inputExtras,
  fixed: z.boolean().optional(),
});

/** A cell as declared in a default row: number in the column's unit, option key, slug, text, or a constant property. */
export const DefaultCell = z.union([Finite, z.string().max(200), ConstantProperty]);

export const TableInput = z.strictObject({
  kind: z.literal("table"),
  symbol: Symbol_,
  label: Label,
  columns: z.array(Column).min(1).max(12),
  minRows: z.number().int().min(0).max(1000),
  maxRows: z.number().int().min(1).max(1000),
  default: z.array(z.record(Symbol_, DefaultCell)).max(1000),
  note: z.string().max(400).optional(),
  appliesWhen: Condition.optional(),
});

export const Input = z.discriminatedUnion("kind", [NumberInput, ChoiceInput, MaterialInput, TableInput]);

export const Result = z.strictObject({
  symbol: Symbol_,
  label: Label,
  quantity: QuantityName,
  unit: UnitText,
  /** Significant digits for people. */
  digits: z.number().int().min(1).max(12).optional(),
  list: z.boolean().optional(),
});

export const Limit = z.strictObject({
  code: z.string().max(64).regex(slugPattern),
  /** What holds while the limit is not broken: "Surface at most {T_allow}". */
  label: Label,
  /** The condition of being broken. */
  when: Condition,
  level: z.enum(["caution", "stop"]),
  /** Said when broken; `{symbol}` inserts a value with its unit. */
  message: Sentence,
});

export const Requirement = z.strictObject({ that: Condition, message: Sentence });

// ───────────────────────────── figures: geometry symbols and the lines they read

const temperatureEnds = { before: Symbol_.optional(), after: Symbol_.optional() };

/** To-scale section through layers with the temperature above it. `temperatures` is a list: first face … last face. */
export const SectionFigure = z.strictObject({
  kind: z.literal("section"),
  title: Label.optional(),
  shape: z.enum(["plane", "round"]),
  /** A table input's symbol, or the layers one by one. */
  layers: z.union([
    Symbol_,
    z
      .array(z.strictObject({ thickness: Symbol_, conductivity: Symbol_.optional(), name: Label.optional() }))
      .min(1)
      .max(12),
  ]),
  /** Columns of the table (when `layers` names one). */
  thickness: Symbol_.optional(),
  conductivity: Symbol_.optional(),
  names: Symbol_.optional(),
  /** List line of face temperatures, or the symbols of each face. */
  temperatures: z.union([Symbol_, z.array(Symbol_).min(2).max(13)]),
  /** Inside diameter, for `round`. */
  inner: Symbol_.optional(),
  /** Symbols of the adjoining temperatures (fluid or air). */
  ...temperatureEnds,
});

/** A temperature (or another quantity) along a place in a body, from lines that are functions of one argument. */
export const ProfileFigure = z.strictObject({
  kind: z.literal("profile"),
  title: Label.optional(),
  shape: z.enum(["plane", "round", "sphere", "half-space"]),
  /** Extent of the body: half thickness, radius or depth. */
  extent: Symbol_,
  /** Input that is the place; the run is repeated along it. */
  place: Symbol_,
  /** Line drawn. */
  value: Symbol_,
  surroundings: Symbol_.optional(),
  time: Symbol_.optional(),
});

export const FinFigure = z.strictObject({
  kind: z.literal("fin"),
  title: Label.optional(),
  shape: z.enum(["straight", "pin", "annular", "triangular", "array"]),
  length: Symbol_,
  thickness: Symbol_,
  width: Symbol_.optional(),
  innerRadius: Symbol_.optional(),
  pitch: Symbol_.optional(),
  count: Symbol_.optional(),
  base: Symbol_,
  tip: Symbol_.optional(),
  surroundings: Symbol_,
});

export const BuriedFigure = z.strictObject({
  kind: z.literal("buried"),
  title: Label.optional(),
  shape: z.enum(["single", "pair", "eccentric"]),
  diameter: Symbol_,
  secondDiameter: Symbol_.optional(),
  depth: Symbol_.optional(),
  distance: Symbol_.optional(),
  temperature: Symbol_,
  secondTemperature: Symbol_.optional(),
  surface: Symbol_.optional(),
});

export const DiscFigure = z.strictObject({
  kind: z.literal("disc"),
  title: Label.optional(),
  source: Symbol_,
  body: Symbol_.optional(),
  thickness: Symbol_.optional(),
  peak: Symbol_.optional(),
});

export const FrontFigure = z.strictObject({
  kind: z.literal("front"),
  title: Label.optional(),
  depth: Symbol_,
  face: Symbol_,
  front: Symbol_,
});

/** Parts of a sum side by side (electronic and lattice conductivity, bounds of a mixture). */
export const SharesFigure = z.strictObject({
  kind: z.literal("shares"),
  title: Label.optional(),
  parts: z.array(Symbol_).min(1).max(8),
  total: Symbol_.optional(),
});

/** Device stack: nodes in series with their temperatures. */
export const StackFigure = z.strictObject({
  kind: z.literal("stack"),
  title: Label.optional(),
  layers: Symbol_,
  thickness: Symbol_,
  area: Symbol_,
  names: Symbol_.optional(),
  temperatures: Symbol_,
  after: Symbol_.optional(),
});

export const BoxFigure = z.strictObject({
  kind: z.literal("box"),
  title: Label.optional(),
  inside: z.tuple([Symbol_, Symbol_, Symbol_]),
  thickness: Symbol_,
  before: Symbol_,
  after: Symbol_,
});

/** Direction-dependent conductivity. */
export const PolarFigure = z.strictObject({
  kind: z.literal("polar"),
  title: Label.optional(),
  angle: Symbol_,
  along: Symbol_,
  across: Symbol_,
  values: z.array(Symbol_).min(1).max(3),
});

/** Results against one input, drawn through evaluate-rows. `from`/`to` in the input's unit. */
export const CurveFigure = z.strictObject({
  kind: z.literal("curve"),
  title: Label,
  x: z.strictObject({
    symbol: Symbol_,
    from: Finite,
    to: Finite,
    scale: z.enum(["linear", "log"]).optional(),
  }),
  y: z.array(Symbol_).min(1).max(4),
});

export const Figure = z.discriminatedUnion("kind", [
  SectionFigure,
  ProfileFigure,
  FinFigure,
  BuriedFigure,
  DiscFigure,
  FrontFigure,
  SharesFigure,
  StackFigure,
  BoxFigure,
  PolarFigure,
  CurveFigure,
]);

// ───────────────────────────── worked cases

export const caseBases = [
  "published",
  "computed independently",
  "measured",
  "from memory",
  "common practice",
] as const;
/** Bases that count as an independent check. */
export const independentBases: readonly CaseBasis[] = ["published", "computed independently", "measured"];

const Tolerance = { relTol: Finite.positive().optional(), absTol: Finite.nonnegative().optional() };
/** Expected value. `absTol` of a temperature is a difference in that unit's degree. */
export const ExpectedValue = z.strictObject({
  value: Finite.optional(),
  values: z.array(Finite).max(1001).optional(),
  unit: UnitText,
  ...Tolerance,
});

/** Inputs as in an API call. */
export const CaseInput = z.union([
  Finite,
  z.string().max(200),
  ConstantProperty,
  z.array(z.record(Symbol_, z.union([Finite, z.string().max(200), ConstantProperty]))).max(1000),
]);

export const WorkedCase = z.strictObject({
  title: Label,
  inputs: z.record(Symbol_, CaseInput),
  expected: z.record(Symbol_, ExpectedValue).optional(),
  /** Problem code with which the run must be refused, instead of `expected`. */
  refused: z
    .enum([
      "missing-input",
      "invalid-input",
      "unknown-material",
      "unit-mismatch",
      "out-of-range",
      "outside-validity",
      "no-solution",
      "crossed-bounds",
      "not-finite",
      "not-converged",
      "budget-exceeded",
    ])
    .optional(),
  source: Sentence,
  basis: z.enum(caseBases),
});

export const Reference = z.strictObject({ text: Sentence, edition: z.string().max(120).optional() });

export const categories = ["walls", "pipes", "joints", "fins", "shapes", "transient", "materials"] as const;

export const Definition = z.strictObject({
  title: z.string().trim().min(1).max(120),
  /** Markdown. */
  summary: z.string().max(8000),
  category: z.enum(categories),
  tags: z.array(z.string().trim().min(1).max(40)).max(20),
  method: z.string().max(2000).optional(),
  references: z.array(Reference).max(40),
  notices: z.array(Sentence).max(20),
  inputs: z.array(Input).min(1).max(60),
  requires: z.array(Requirement).max(40),
  working: z.string().max(20_000),
  results: z.array(Result).min(1).max(60),
  limits: z.array(Limit).max(40),
  figures: z.array(Figure).max(8),
  cases: z.array(WorkedCase).max(200),
});

export type Definition = z.infer<typeof Definition>;
export type Input = z.infer<typeof Input>;
export type NumberInput = z.infer<typeof NumberInput>;
export type ChoiceInput = z.infer<typeof ChoiceInput>;
export type MaterialInput = z.infer<typeof MaterialInput>;
export type TableInput = z.infer<typeof TableInput>;
export type Column = z.infer<typeof Column>;
export type Result = z.infer<typeof Result>;
export type Limit = z.infer<typeof Limit>;
export type Requirement = z.infer<typeof Requirement>;
export type Figure = z.infer<typeof Figure>;
export type WorkedCase = z.infer<typeof WorkedCase>;
export type CaseBasis = (typeof caseBases)[number];
