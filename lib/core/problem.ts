import { z } from "zod";
import { errorCodes, type ErrorCode } from "./errors";

/** Shape of every refusal, RFC 9457. */

const codes = Object.keys(errorCodes) as [ErrorCode, ...ErrorCode[]];

export const ProblemItem = z.object({
  /** JSON pointer as URI fragment into the body, `#/inputs/t/unit`; a query parameter as `#/query/limit`. */
  pointer: z.string(),
  code: z.enum(codes),
  message: z.string(),
  received: z.union([z.string(), z.number(), z.boolean(), z.null()]).optional(),
  expected: z.string().optional(),
  acceptedUnits: z.array(z.string()).optional(),
  limit: z.union([z.string(), z.number()]).optional(),
});

/** What is wrong with one row of many; the others stand. */
export const FaultOfRow = z.object({
  code: z.enum(codes),
  detail: z.string(),
  errors: z.array(ProblemItem).optional(),
});
export type FaultOfRow = z.infer<typeof FaultOfRow>;

export const Problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string(),
  /** The request's id, as in X-Request-Id. */
  instance: z.string(),
  /** W3C trace id, when the caller sent one. */
  traceId: z.string().optional(),
  /** Every problem of the request; the type above is that of the first. */
  errors: z.array(ProblemItem).optional(),
  /** The scope that the key lacks. */
  scope: z.string().optional(),
  /** The evaluation, when only its status was refused. */
  evaluation: z.unknown().optional(),
  /** What is wrong with a definition. */
  diagnostics: z.array(z.unknown()).optional(),
  /** Reason and date of a withdrawal. */
  withdrawal: z.unknown().optional(),
});

export type Problem = z.infer<typeof Problem>;

/** Part of a JSON pointer, RFC 6901 in a URI fragment. */
export function pointerTo(...path: readonly PropertyKey[]): string {
  return `#${path.map((part) => `/${encodeURIComponent(String(part).replace(/~/g, "~0").replace(/\//g, "~1"))}`).join("")}`;
}
