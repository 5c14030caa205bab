/** Modified Bessel function of the first kind, scaled: e^(−|x|)·I_n(x), n whole. Power series (A&S 9.6.10), Hankel's expansion (9.7.1) for large x and small n. */
export function besselIScaled(n: number, x: number): number {
  const order = Math.abs(n);
  const size = Math.abs(x);
  const sign = x < 0 && order % 2 === 1 ? -1 : 1;
  if (Number.isNaN(x)) return Number.NaN;
  if (size === 0) return order === 0 ? 1 : 0;
  if (size > 30 && size > order * order)
    return (sign * hankel(order, size, -1)) / Math.sqrt(2 * Math.PI * size);
  if (size > 700) return sign * byRatio(order, size);
  const quarter = (size * size) / 4;
  let term = Math.exp(-size);
  for (let k = 1; k <= order; k += 1) term *= size / 2 / k;
  let sum = term;
  for (let k = 1; k < 2000; k += 1) {
    term *= quarter / (k * (k + order));
    sum += term;
    if (term < sum * 1e-18) break;
  }
  return sign * sum;
}

/** I_n from I_0 by the ratios that Miller's downward recurrence gives. */
function byRatio(order: number, x: number): number {
  let ratio = 0;
  let product = 1;
  for (let k = order + 2 * Math.ceil(Math.sqrt(x)) + 60; k >= 1; k -= 1) {
    ratio = 1 / ((2 * k) / x + ratio);
    if (k <= order) product *= ratio;
  }
  return product * besselIScaled(0, x);
}

/** Asymptotic sum Σ (∓1)^k a_k(n)/x^k. */
function hankel(n: number, x: number, sign: 1 | -1): number {
  let term = 1;
  let sum = 1;
  for (let k = 1; k < 200; k += 1) {
    const next = (term * sign * (4 * n * n - (2 * k - 1) ** 2)) / (k * 8 * x);
    if (Math.abs(next) >= Math.abs(term)) break;
    term = next;
    sum += term;
    if (Math.abs(term) < 1e-18) break;
  }
  return sum;
}

/** Modified Bessel function of the first kind. */
export function besselI(n: number, x: number): number {
  return besselIScaled(n, x) * Math.exp(Math.abs(x));
}

/** Modified Bessel function of the second kind, scaled: e^x·K_n(x), x > 0, by its integral (A&S 9.6.24) and upward recurrence. */
export function besselKScaled(n: number, x: number): number {
  const order = Math.abs(n);
  if (!(x >= 0)) return Number.NaN;
  if (x === 0) return Number.POSITIVE_INFINITY;
  let below = byIntegral(0, x);
  if (order === 0) return below;
  let here = byIntegral(1, x);
  for (let k = 1; k < order; k += 1) [below, here] = [here, below + ((2 * k) / x) * here];
  return here;
}

/**
 * e^x·K_n(x) = ∫ exp(−2x·sinh²(t/2))·cosh(nt) dt by the trapezoidal rule, whose error falls exponentially with the step
 * for such integrands (L. N. Trefethen and J. A. C. Weideman, SIAM Review 56 (2014) 385); cut where the integrand is below 1e-18.
 */
function byIntegral(order: 0 | 1, x: number): number {
  const reach = Math.acosh(1 + 46 / x);
  const steps = Math.max(36, Math.ceil(reach * 10));
  const h = reach / steps;
  let sum = 0.5;
  for (let j = 1; j <= steps; j += 1) {
    const half = Math.sinh((j * h) / 2);
    sum += Math.exp(-2 * x * half * half) * (order === 0 ? 1 : Math.cosh(j * h));
  }
  return sum * h;
}

/** Modified Bessel function of the second kind, x > 0. */
export function besselK(n: number, x: number): number {
  return besselKScaled(n, x) * Math.exp(-x);
}

/** Bessel function of the first kind by its integral (A&S 9.1.21), which the trapezoidal rule does to rounding. */
export function besselJ(n: number, x: number): number {
  const points = Math.ceil(Math.abs(x) + 12 * Math.cbrt(Math.abs(x)) + 2 * Math.abs(n)) + 40;
  let sum = 0;
  for (let j = 0; j < points; j += 1) {
    const angle = (2 * Math.PI * (j + 0.5)) / points;
    sum += Math.cos(n * angle - x * Math.sin(angle));
  }
  return sum / points;
}

/** Bessel function of the second kind, x > 0. */
export function besselY(n: number, x: number): number {
  if (!(x > 0)) return x === 0 ? Number.NEGATIVE_INFINITY : Number.NaN;
  // Neumann's series for order 0 (A&S 9.1.88), the Wronskian for order 1, recurrence above.
  const terms = Math.ceil(x / 2) + 30;
  let sum = 0;
  for (let k = terms; k >= 1; k -= 1) sum += ((k % 2 === 1 ? 1 : -1) * besselJ(2 * k, x)) / k;
  const y0 = (2 / Math.PI) * (Math.log(x / 2) + 0.5772156649015329) * besselJ(0, x) + (4 / Math.PI) * sum;
  if (n === 0) return y0;
  const j0 = besselJ(0, x);
  const y1 = (besselJ(1, x) * y0 - 2 / (Math.PI * x)) / j0;
  let below = y0;
  let here = y1;
  for (let k = 1; k < n; k += 1) [below, here] = [here, ((2 * k) / x) * here - below];
  return here;
}

/** m-th positive zero of J_n by McMahon's expansion and Newton steps. */
export function besselJZero(n: number, m: number): number {
  const b = (m + n / 2 - 0.25) * Math.PI;
  const mu = 4 * n * n;
  let x = b - (mu - 1) / (8 * b) - (4 * (mu - 1) * (7 * mu - 31)) / (3 * (8 * b) ** 3);
  for (let step = 0; step < 20; step += 1) {
    const value = besselJ(n, x);
    const slope = n === 0 ? -besselJ(1, x) : besselJ(n - 1, x) - (n / x) * value;
    const next = x - value / slope;
    if (Math.abs(next - x) < 1e-15 * x) return next;
    x = next;
  }
  return x;
}
