import { z } from "zod";
import { revisionStates } from "@/db/vocabulary";
import { Slug } from "@/lib/calculation/definition";
import { Material, materialBases, materialClasses } from "@/lib/calculation/material";
import { pageQuery } from "@/lib/core/paging";

/** Shapes of what materials are asked and what they answer, and the members that revisions of all kinds share. */

const Moment = z.iso.datetime();

/** A registered schema followed by `.nullable()` is written as one that refuses null; a union is not. */
export const orNull = <T extends z.ZodType>(schema: T) => z.union([schema, z.null()]);

export const RevisionNumber = z.coerce.number().int().min(1).max(1_000_000).describe("Number of a revision.");

/** Somebody as named beside what they did; the supplied set has no id. */
export const Named = z.object({ id: orNull(z.string()), name: z.string() });

export const RevisionMembers = z.object({
  revision: z.int(),
  state: z.enum(revisionStates),
  title: z.string(),
  definitionHash: z.string(),
  /** Version of the engine that it was checked with. */
  engine: z.string(),
  /** Arrived with Coldface. */
  supplied: z.boolean(),
  /** Whether two seniors of the works have signed for what arrived with Coldface. */
  adopted: z.boolean(),
  originators: z.array(Named),
  checkedBy: orNull(Named),
  issuedBy: orNull(Named),
  issuedAt: orNull(Moment),
  supersededAt: orNull(Moment),
  withdrawnAt: orNull(Moment),
  withdrawnReason: orNull(z.string()),
  /** Announced end of use. */
  withdrawalDate: orNull(Moment),
  /** When it must have been verified again. */
  verifyBy: orNull(Moment),
  reasonForChange: orNull(z.string()),
});

const MaterialSlug = Slug.describe("Slug of the material.");

export const MaterialParam = z.object({ slug: MaterialSlug });
export const MaterialRevisionParam = z.object({ slug: MaterialSlug, revision: RevisionNumber });

/** Properties by name; the names are those of the working language. */
export const PropertyRange = z.object({
  unit: z.string(),
  /** Ends of the valid range, in `argumentUnit`. */
  min: z.number(),
  max: z.number(),
  argumentUnit: z.string(),
  basis: z.enum(materialBases),
});

export const MaterialItem = z.object({
  slug: z.string(),
  name: z.string(),
  class: z.enum(materialClasses),
  condition: z.string(),
  revision: z.int(),
  state: z.enum(revisionStates),
  supplied: z.boolean(),
  adopted: z.boolean(),
  issuedAt: orNull(Moment),
  properties: z.record(z.string(), PropertyRange),
});
export const MaterialPage = z.object({ items: z.array(MaterialItem), nextCursor: orNull(z.string()) });

export const MaterialRevisionView = z.object({
  material: z.string(),
  ...RevisionMembers.shape,
  definition: Material,
});
export const MaterialView = z.object({
  slug: z.string(),
  class: z.enum(materialClasses),
  createdAt: Moment,
  /** The revision that a run by slug uses; the latest that may be seen when none is issued. */
  current: MaterialRevisionView,
});

export const ListMaterialsQuery = z.strictObject({
  ...pageQuery,
  search: z
    .string()
    .trim()
    .min(1)
    .max(120)
    .optional()
    .describe("Beginnings of words in name, class, condition or slug; all must be found."),
  class: z.enum(materialClasses).optional().describe("Only this class."),
  state: z.enum(revisionStates).optional().describe("Only revisions in this state."),
});

export const PropertyParam = z.object({
  slug: MaterialSlug,
  name: z
    .string()
    .min(1)
    .max(32)
    .describe("Property as the working language calls it: `k`, `rho`, `c`, `eps` …"),
});
export const PropertyValueQuery = z.strictObject({
  T: z
    .string()
    .trim()
    .min(1)
    .max(64)
    .describe("Temperature: a number in `unit`, or an amount such as `480 °F`."),
  to: z
    .string()
    .trim()
    .min(1)
    .max(64)
    .optional()
    .describe("Other end of a range: the mean from `T` to it is answered."),
  unit: z
    .string()
    .trim()
    .min(1)
    .max(48)
    .optional()
    .describe("Unit of bare numbers in `T` and `to`; without it that of the property's argument."),
  in: z
    .string()
    .trim()
    .min(1)
    .max(48)
    .optional()
    .describe("Unit of the answer; without it that of the property."),
  revision: RevisionNumber.optional(),
  allowExtrapolation: z
    .enum(["true", "false"])
    .optional()
    .describe("Read outside the valid range, with a caution."),
});
export const PropertyValue = z.object({
  material: z.string(),
  revision: z.int(),
  property: z.string(),
  value: z.number(),
  unit: z.string(),
  ucum: orNull(z.string()),
  /** The temperature asked, as read. */
  T: z.object({ value: z.number(), unit: z.string() }),
  to: z.object({ value: z.number(), unit: z.string() }).optional(),
  source: z.string(),
  basis: z.enum(materialBases),
  cautions: z.array(z.object({ code: z.string(), message: z.string() })),
});

export type RevisionMembers = z.infer<typeof RevisionMembers>;
export type MaterialItem = z.infer<typeof MaterialItem>;
export type MaterialView = z.infer<typeof MaterialView>;
export type MaterialRevisionView = z.infer<typeof MaterialRevisionView>;
export type ListMaterialsQuery = z.infer<typeof ListMaterialsQuery>;
export type PropertyValueQuery = z.infer<typeof PropertyValueQuery>;
export type PropertyValue = z.infer<typeof PropertyValue>;
