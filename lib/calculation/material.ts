import { z } from "zod";
import { propertyNames } from "@/lib/language/types";
import { Symbol_ } from "./definition";

/** A material as stored: properties in pieces, each with its own range; one canonical text that is hashed. */

const Finite = z.number().refine(Number.isFinite, "A finite number.");
const UnitText = z.string().min(1).max(48);
const Range = z
  .strictObject({ min: Finite, max: Finite, unit: UnitText })
  .refine((range) => range.min <= range.max, "The range ends below its beginning.");

const pieceMembers = { range: Range, source: z.string().max(600).optional() };

/** One piece of a property: a form and the range it holds in. Values in the property's `unit` for an argument in its `argumentUnit`. */
export const Piece = z.discriminatedUnion("form", [
  z.strictObject({ form: z.literal("constant"), value: Finite, ...pieceMembers }),
  /** Σ cᵢ·Tⁱ */
  z.strictObject({
    form: z.literal("polynomial"),
    coefficients: z.array(Finite).min(1).max(20),
    ...pieceMembers,
  }),
  /** log₁₀ k = Σ cᵢ·(log₁₀ T)ⁱ */
  z.strictObject({
    form: z.literal("log10-polynomial"),
    coefficients: z.array(Finite).min(1).max(20),
    ...pieceMembers,
  }),
  /** log₁₀ k = P(√T)/Q(√T); coefficients from the constant term up. */
  z.strictObject({
    form: z.literal("log10-ratio"),
    numerator: z.array(Finite).min(1).max(12),
    denominator: z.array(Finite).min(1).max(12),
    ...pieceMembers,
  }),
  z.strictObject({
    form: z.literal("table"),
    interpolation: z.enum(["linear", "monotone-cubic"]),
    points: z
      .array(z.tuple([Finite, Finite]))
      .min(2)
      .max(1000),
    ...pieceMembers,
  }),
  /** Lines of the working language that see `T` (absolute temperature) and the constants; the line named like the property is its value. */
  z.strictObject({ form: z.literal("working"), working: z.string().min(1).max(20_000), ...pieceMembers }),
]);

export const materialBases = [
  "published",
  "computed independently",
  "measured",
  "from memory",
  "common practice",
] as const;

export const Property = z.strictObject({
  pieces: z.array(Piece).min(1).max(20),
  argumentUnit: UnitText,
  unit: UnitText,
  uncertainty: z
    .strictObject({
      relative: Finite.nonnegative().optional(),
      absolute: Finite.nonnegative().optional(),
      kind: z.enum(["standard", "expanded95", "unstated"]),
    })
    .optional(),
  source: z.string().min(1).max(600),
  basis: z.enum(materialBases),
  status: z.enum(["typical", "declared", "design", "measured"]),
});

export const materialClasses = [
  "metal",
  "refractory",
  "masonry",
  "insulation",
  "polymer",
  "liquid",
  "gas",
  "other",
] as const;

export const Material = z.strictObject({
  name: z.string().trim().min(1).max(120),
  class: z.enum(materialClasses),
  /** Moisture, age, density, test method. */
  condition: z.string().max(400),
  service: z
    .strictObject({
      min: z.strictObject({ value: Finite, unit: UnitText }).optional(),
      max: z.strictObject({ value: Finite, unit: UnitText }).optional(),
      note: z.string().max(400),
    })
    .optional(),
  constants: z
    .record(
      Symbol_,
      z.strictObject({ value: Finite, unit: UnitText, quantity: z.string().max(64).optional() }),
    )
    .optional(),
  properties: z.partialRecord(z.enum(propertyNames), Property),
  note: z.string().max(1000).optional(),
});

export type Material = z.infer<typeof Material>;
export type Property = z.infer<typeof Property>;
export type Piece = z.infer<typeof Piece>;
export type MaterialClass = (typeof materialClasses)[number];
