/**
 * Chebyshev sum Σ c_k·T_k(t) for |t| ≤ 1 by Clenshaw's recurrence (C. W. Clenshaw, MTAC 9 (1955) 118). The tables hold
 * c_0 already halved.
 */
export function chebyshev(coefficients: Float64Array, t: number): number {
  const twice = 2 * t;
  let here = 0;
  let above = 0;
  for (let k = coefficients.length - 1; k > 0; k -= 1) {
    const next = twice * here + (coefficients[k]! - above);
    above = here;
    here = next;
  }
  return t * here + (coefficients[0]! - above);
}
