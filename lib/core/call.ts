import { CodedError, type FieldProblem } from "./errors";

/** What accompanies one call of a verb that changes something or gathers faults. */
export interface Call<Tx = unknown, Result = unknown> {
  /** Faults already found in the request's shape; the verb adds its own and refuses with all of them. */
  readonly problems: readonly FieldProblem[];
  /** Keeps the answer for a request sent again. Call it inside the transaction of the effect. */
  remember(tx: Tx, result: Result): Promise<void>;
}

/** A call from within: no faults, nothing to remember. */
export const plainCall: Call = { problems: [], remember: async () => undefined };

/** Runs `work`; throws what it found together with the faults of the request's shape. */
export async function withProblems<Result>(
  problems: readonly FieldProblem[],
  work: () => Promise<Result>,
): Promise<Result> {
  if (problems.length === 0) return work();
  const found = await work().then(
    () => [],
    (error: unknown) => {
      if (error instanceof CodedError && error.problems.length > 0) return error.problems;
      throw error;
    },
  );
  throw CodedError.from(mergeProblems(problems, found));
}

/** Both together, without what follows from the first: an input left out for its fault is missing to the run. */
export function mergeProblems(
  known: readonly FieldProblem[],
  found: readonly FieldProblem[],
): FieldProblem[] {
  const news = found.filter((problem) => !known.some((other) => within(other.pointer, problem.pointer)));
  return [...known, ...news];
}

/** Whether two pointers name the same place or one lies within the other. */
function within(a: string, b: string): boolean {
  return `${a}/`.startsWith(`${b}/`) || `${b}/`.startsWith(`${a}/`);
}
