const letters: Record<string, string> = {
  alpha: "α",
  beta: "β",
  gamma: "γ",
  delta: "δ",
  epsilon: "ε",
  eps: "ε",
  zeta: "ζ",
  eta: "η",
  theta: "θ",
  kappa: "κ",
  lambda: "λ",
  mu: "µ",
  nu: "ν",
  xi: "ξ",
  pi: "π",
  rho: "ρ",
  sigma: "σ",
  tau: "τ",
  phi: "φ",
  chi: "χ",
  psi: "ψ",
  omega: "ω",
  Delta: "Δ",
  Theta: "Θ",
  Phi: "Φ",
  Psi: "Ψ",
  Omega: "Ω",
  inf: "∞",
};

/** A symbol as engineers write it: `T_surface` with an upright subscript, Greek by its English name. */
export function SymbolText({ symbol }: { symbol: string }) {
  const [base = "", ...rest] = symbol.split("_");
  const subscript = rest.map((part) => letters[part] ?? part).join(" ");
  return (
    <span className="sym" aria-hidden="true">
      {letters[base] ?? base}
      {subscript ? <sub>{subscript}</sub> : null}
    </span>
  );
}
