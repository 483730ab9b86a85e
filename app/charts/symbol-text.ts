const greek: Readonly<Record<string, string>> = {
  alpha: 'α',
  beta: 'β',
  gamma: 'γ',
  delta: 'δ',
  epsilon: 'ε',
  zeta: 'ζ',
  eta: 'η',
  theta: 'θ',
  kappa: 'κ',
  lambda: 'λ',
  mu: 'μ',
  nu: 'ν',
  xi: 'ξ',
  rho: 'ρ',
  sigma: 'σ',
  tau: 'τ',
  phi: 'φ',
  chi: 'χ',
  psi: 'ψ',
  omega: 'ω',
};

const lowered = '₀₁₂₃₄₅₆₇₈₉';

/** A name of the notebook as plain text for drawings and files: `sigma1` is σ₁. */
export function symbolText(name: string): string {
  const [, letters = name, digits = '', rest = ''] = /^([A-Za-z]+)(\d*)(.*)$/.exec(name) ?? [];
  const subscript = [...digits].map((digit) => lowered[Number(digit)] ?? digit).join('');
  return (greek[letters] ?? letters) + subscript + rest.replaceAll("'", '′');
}
