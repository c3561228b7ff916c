/** Greek letters by the names under which symbols spell them out: TeX command and character. */
const table: Record<string, readonly [tex: string, character: string]> = {
  alpha: ['\\alpha', 'α'],
  beta: ['\\beta', 'β'],
  gamma: ['\\gamma', 'γ'],
  delta: ['\\delta', 'δ'],
  epsilon: ['\\varepsilon', 'ε'],
  zeta: ['\\zeta', 'ζ'],
  eta: ['\\eta', 'η'],
  theta: ['\\theta', 'θ'],
  iota: ['\\iota', 'ι'],
  kappa: ['\\kappa', 'κ'],
  lambda: ['\\lambda', 'λ'],
  mu: ['\\mu', 'μ'],
  nu: ['\\nu', 'ν'],
  xi: ['\\xi', 'ξ'],
  omicron: ['\\omicron', 'ο'],
  pi: ['\\pi', 'π'],
  rho: ['\\rho', 'ρ'],
  sigma: ['\\sigma', 'σ'],
  tau: ['\\tau', 'τ'],
  upsilon: ['\\upsilon', 'υ'],
  phi: ['\\varphi', 'φ'],
  chi: ['\\chi', 'χ'],
  psi: ['\\psi', 'ψ'],
  omega: ['\\omega', 'ω'],
  Gamma: ['\\Gamma', 'Γ'],
  Delta: ['\\Delta', 'Δ'],
  Theta: ['\\Theta', 'Θ'],
  Lambda: ['\\Lambda', 'Λ'],
  Xi: ['\\Xi', 'Ξ'],
  Pi: ['\\Pi', 'Π'],
  Sigma: ['\\Sigma', 'Σ'],
  Upsilon: ['\\Upsilon', 'Υ'],
  Phi: ['\\Phi', 'Φ'],
  Psi: ['\\Psi', 'Ψ'],
  Omega: ['\\Omega', 'Ω'],
}

export interface GreekLetter {
  tex: string
  character: string
  /** As one says it: `capital delta`. */
  speech: string
}

export const greekLetter = (name: string): GreekLetter | undefined => {
  const entry = Object.hasOwn(table, name) ? table[name] : undefined
  if (!entry) return undefined
  const speech = /^[A-Z]/.test(name) ? `capital ${name.toLowerCase()}` : name
  return { tex: entry[0], character: entry[1], speech }
}
