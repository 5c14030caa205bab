import { inWords, NumericFault } from "./fault";

export interface Quadrature {
  readonly value: number;
  /** Estimate of the error, absolute. */
  readonly error: number;
}

export interface QuadratureOptions {
  readonly relTol?: number;
  readonly absTol?: number;
  readonly maxEvaluations?: number;
}

/* Gauss-Kronrod 7-15 rule: R. Piessens and others, QUADPACK, Springer 1983, routine QK15. Abscissae of the Kronrod rule
   in falling order; every second one belongs to the Gauss rule. */
const abscissae = [
  0.991455371120812639206854697526329, 0.949107912342758524526189684047851,
  0.864864423359769072789712788640926, 0.741531185599394439863864773280788,
  0.58608723546769113029414483825873, 0.405845151377397166906606412076961,
  0.207784955007898467600689403773245, 0,
] as const;
const kronrod = [
  0.02293532201052922496373200805897, 0.063092092629978553290700663189204,
  0.104790010322250183839876322541518, 0.140653259715525918745189590510238,
  0.16900472663926790282829543641543, 0.190350578064785409913256402421014,
  0.204432940075298892414161999234649, 0.209482141084727828012999174891714,
] as const;
const gauss = [
  0.129484966168869693270611432679082, 0.27970539148927666790146777142378,
  0.381830050505118944950369775488975, 0.417959183673469387755102040816327,
] as const;

interface Panel {
  readonly from: number;
  readonly to: number;
  readonly value: number;
  readonly error: number;
  /** Integral of |f|, which bounds what rounding does. */
  readonly size: number;
  /** Whether all fifteen values are the same. */
  readonly level: boolean;
}

/** Panels that a first look at equal values is confirmed with: a narrow peak can hide between fifteen points. */
const confirming = 8;

function panel(f: (x: number) => number, from: number, to: number): Panel {
  const half = 0.5 * to - 0.5 * from;
  const centre = from + half;
  const atCentre = f(centre);
  let k = atCentre * kronrod[7];
  let g = atCentre * gauss[3];
  let size = Math.abs(k);
  let level = true;
  for (let index = 0; index < 7; index += 1) {
    const offset = half * abscissae[index]!;
    const left = f(centre - offset);
    const right = f(centre + offset);
    const weight = kronrod[index]!;
    k += weight * (left + right);
    size += weight * (Math.abs(left) + Math.abs(right));
    if (index % 2 === 1) g += gauss[(index - 1) / 2]! * (left + right);
    if (left !== atCentre || right !== atCentre) level = false;
  }
  if (!Number.isFinite(k * half))
    throw new NumericFault(
      "not-finite",
      `The integrand is not finite between ${inWords(from)} and ${inWords(to)}.`,
      {
        from,
        to,
      },
    );
  return {
    from,
    to,
    value: k * half,
    error: Math.abs((k - g) * half),
    size: size * Math.abs(half),
    level,
  };
}

/**
 * Integral of f from lo to hi by adaptive bisection of the worst panel under the Gauss-Kronrod 7-15 rule, which never
 * asks f at the ends; negative when hi lies below lo. The error estimate is the difference of the two rules, which is
 * pessimistic for smooth integrands; it never has to fall below what rounding of the integrand's size allows.
 * Throws NumericFault `not-finite` where f or an end is not finite, `not-converged` (with value, error and the place x of
 * the trouble) when the evaluations run out or a panel cannot be halved any more.
 */
export function integrate(
  f: (x: number) => number,
  lo: number,
  hi: number,
  options: QuadratureOptions = {},
): Quadrature {
  const { relTol = 1e-11, absTol = 0, maxEvaluations = 20_000 } = options;
  if (lo === hi) return { value: 0, error: 0 };
  const first = panel(f, lo, hi);
  const panels: Panel[] = [first];
  let evaluations = 15;
  if (first.level) {
    const end = (index: number) => (index === confirming ? hi : lo + (hi - lo) * (index / confirming));
    panels.length = 0;
    for (let index = 0; index < confirming; index += 1) panels.push(panel(f, end(index), end(index + 1)));
    evaluations += 15 * confirming;
  }
  for (; ; evaluations += 30) {
    let value = 0;
    let error = 0;
    let size = 0;
    let worst = 0;
    for (let index = 0; index < panels.length; index += 1) {
      const entry = panels[index]!;
      value += entry.value;
      error += entry.error;
      size += entry.size;
      if (entry.error > panels[worst]!.error) worst = index;
    }
    if (error <= Math.max(absTol, relTol * Math.abs(value), 50 * Number.EPSILON * size))
      return { value, error };
    const { from, to } = panels[worst]!;
    const middle = 0.5 * from + 0.5 * to;
    if (evaluations + 30 > maxEvaluations || middle === from || middle === to) {
      throw new NumericFault(
        "not-converged",
        `After ${evaluations} evaluations the integral ${inWords(value)} is known to ±${inWords(error)} only; the trouble is near ${inWords(middle)}.`,
        { value, error, x: middle },
      );
    }
    panels[worst] = panel(f, from, middle);
    panels.push(panel(f, middle, to));
  }
}
