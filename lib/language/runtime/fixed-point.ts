import { RunFault } from "../types";

const maxSteps = 500;
const relativeTolerance = 1e-12;
const smallestStep = 1 / 64;

interface Progress {
  /** Share of the step that is taken. */
  damping: number;
  /** Largest relative change of the step before. */
  change: number;
  /** Steps in a row that brought the change down. */
  gains: number;
}

/** Halves the step when the change grows, doubles it again (up to the whole) after four gains in a row. */
function adapt(progress: Progress, change: number): void {
  if (change >= progress.change) {
    progress.damping = Math.max(smallestStep, progress.damping / 2);
    progress.gains = 0;
  } else if (++progress.gains >= 4 && progress.damping < 1) {
    progress.damping = Math.min(1, progress.damping * 2);
    progress.gains = 0;
  }
  progress.change = change;
}

function relativeChange(from: number, to: number): number {
  const difference = Math.abs(to - from);
  return difference === 0 ? 0 : difference / Math.max(Math.abs(from), Math.abs(to));
}

function notConverged(change: number): never {
  throw new RunFault(
    "not-converged",
    `fixed_point did not settle within ${maxSteps} steps: the last step still changed the value by ` +
      `${(change * 100).toPrecision(2)} %. Start nearer to the answer, or write the equation with balance.`,
    {},
    { steps: maxSteps, change },
  );
}

function notFinite(): never {
  throw new RunFault("not-finite", "fixed_point reached a value that is not finite.");
}

/**
 * x with f(x) = x, by repeated substitution with adaptive damping from `start`; settled when x and f(x) agree within
 * 1e-12 of the larger. Answers f(x). Throws `RunFault` `not-converged` after 500 steps, `not-finite`.
 */
export function fixedPointNumber(f: (x: number) => number, start: number): number {
  const progress: Progress = { damping: 1, change: Infinity, gains: 0 };
  let x = start;
  for (let step = 0; step < maxSteps; step++) {
    const y = f(x);
    if (!Number.isFinite(y)) notFinite();
    const change = relativeChange(x, y);
    if (change <= relativeTolerance) return y;
    adapt(progress, change);
    x += progress.damping * (y - x);
  }
  return notConverged(progress.change);
}

/**
 * The same for a list of `n` values, settled when every element agrees. `x` is room for the iterate; the result is
 * written to `result` (both at least `n` long). `f` may answer a buffer that it reuses.
 */
export function fixedPointList(
  f: (x: Float64Array) => Float64Array,
  start: Float64Array,
  n: number,
  x: Float64Array,
  result: Float64Array,
): void {
  const progress: Progress = { damping: 1, change: Infinity, gains: 0 };
  for (let i = 0; i < n; i++) x[i] = start[i]!;
  for (let step = 0; step < maxSteps; step++) {
    const y = f(x);
    let change = 0;
    for (let i = 0; i < n; i++) {
      if (!Number.isFinite(y[i]!)) notFinite();
      change = Math.max(change, relativeChange(x[i]!, y[i]!));
    }
    if (change <= relativeTolerance) {
      for (let i = 0; i < n; i++) result[i] = y[i]!;
      return;
    }
    adapt(progress, change);
    for (let i = 0; i < n; i++) x[i] = x[i]! + progress.damping * (y[i]! - x[i]!);
  }
  notConverged(progress.change);
}
