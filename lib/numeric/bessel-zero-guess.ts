/**
 * The m-th negative zero of the Airy function Ai by its asymptotic series (DLMF 9.9.6, 9.9.18); the first, the least
 * accurate, to 4e-4.
 */
function airyZero(m: number): number {
  const t = (3 * Math.PI * (4 * m - 1)) / 8;
  const inverse = 1 / (t * t);
  return -Math.cbrt(t * t) * (1 + inverse * (5 / 48 - inverse * (5 / 36 - (inverse * 77125) / 82944)));
}

/** z ≥ 1 with √(z² − 1) − arcsec z = a ≥ 0, by Newton's method in the angle arcsec z. */
function olverZ(a: number): number {
  // tan θ − θ = a; for small a it is θ³/3, for large a it is a + π/2 away from the pole.
  let angle = a < 1 ? Math.atan(Math.cbrt(3 * a)) : Math.atan(a + Math.PI / 2 - 1 / (a + Math.PI / 2));
  for (let step = 0; step < 30; step += 1) {
    const tangent = Math.tan(angle);
    const move = (tangent - angle - a) / (tangent * tangent);
    angle -= move;
    if (Math.abs(move) < 1e-12) break;
  }
  return 1 / Math.cos(angle);
}

/**
 * First guess of the m-th positive zero of J_n: McMahon's expansion for order 0 (DLMF 10.21.19), for the others Olver's
 * uniform expansion with its first correction (DLMF 10.21.41 and 10.21.43), which holds for every m.
 */
export function zeroGuess(n: number, m: number): number {
  if (n === 0) {
    const a = (m - 0.25) * Math.PI;
    const inverse = 1 / (8 * a);
    return a + inverse * (1 - (inverse * inverse * 124) / 3);
  }
  const zeta = airyZero(m) / Math.cbrt(n * n);
  const z = olverZ((2 / 3) * Math.sqrt(-zeta) * -zeta);
  const root = Math.sqrt(z * z - 1);
  const b0 = -5 / (48 * zeta * zeta) + (5 / (24 * root ** 3) + 1 / (8 * root)) / Math.sqrt(-zeta);
  // h² = √(4ζ/(1 − z²))
  return n * z + (z * Math.sqrt((4 * -zeta) / (root * root)) * b0) / (2 * n);
}
