import type { z } from "zod";
import { CodedError, type FieldProblem } from "./errors";
import { pointerTo } from "./problem";

/** Reads `input` with a schema; throws CodedError with every problem and its place in the input. */
export function parseInput<S extends z.ZodType>(schema: S, input: unknown): z.output<S> {
  const parsed = schema.safeParse(input);
  if (parsed.success) return parsed.data;
  throw CodedError.from(
    parsed.error.issues.map((issue): FieldProblem => ({
      pointer: pointerTo(...issue.path),
      code: issue.code === "unrecognized_keys" ? "unknown-member" : "invalid-input",
      message: issue.message,
    })),
  );
}
