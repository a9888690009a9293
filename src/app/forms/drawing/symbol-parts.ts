const GREEK: Readonly<Record<string, string>> = {
  alpha: 'α',
  beta: 'β',
  gamma: 'γ',
  delta: 'δ',
  zeta: 'ζ',
  eta: 'η',
  theta: 'θ',
  kappa: 'κ',
  lambda: 'λ',
  mu: 'μ',
  xi: 'ξ',
  rho: 'ρ',
  sigma: 'σ',
  tau: 'τ',
  phi: 'φ',
  psi: 'ψ',
  omega: 'ω',
};

export interface SymbolParts {
  readonly base: string;
  readonly below: string;
}

/** A symbol with its index: `k_s` and `m₀` as written, an id such as `tau2` or `m0` in the same form. */
export function symbolParts(symbol: string): SymbolParts {
  const [, letters = symbol, written, digits] = /^([^_\d₀-₉]+)(?:_(.+)|([\d₀-₉]+))?$/.exec(symbol) ?? [];
  const below = written ?? (digits ?? '').replace(/[₀-₉]/g, (sign) => String(sign.charCodeAt(0) - 0x2080));
  return { base: GREEK[letters] ?? letters, below };
}
