const greek: Record<string, string> = {
  alpha: 'α',
  beta: 'β',
  gamma: 'γ',
  delta: 'δ',
  epsilon: 'ε',
  zeta: 'ζ',
  eta: 'η',
  theta: 'θ',
  iota: 'ι',
  kappa: 'κ',
  lambda: 'λ',
  mu: 'μ',
  nu: 'ν',
  xi: 'ξ',
  pi: 'π',
  rho: 'ρ',
  sigma: 'σ',
  tau: 'τ',
  upsilon: 'υ',
  phi: 'φ',
  chi: 'χ',
  psi: 'ψ',
  omega: 'ω',
  Gamma: 'Γ',
  Delta: 'Δ',
  Theta: 'Θ',
  Lambda: 'Λ',
  Xi: 'Ξ',
  Pi: 'Π',
  Sigma: 'Σ',
  Phi: 'Φ',
  Psi: 'Ψ',
  Omega: 'Ω',
}

/** A symbol of the expression language in two parts, for plain text and drawings: `tau_max` → τ, max. */
export const symbolParts = (symbol: string): { base: string; index: string } => {
  const [base = '', ...indices] = symbol.split('_')
  const letters = (name: string) => name.replace(/^[A-Za-z]+/, (word) => greek[word] ?? word)
  return { base: letters(base), index: indices.map(letters).join(',') }
}

/** The same in one run of text, for places that can hold no index: `τ_max`. */
export const symbolText = (symbol: string): string => {
  const { base, index } = symbolParts(symbol)
  return index ? `${base}_${index}` : base
}

const raised: Record<string, string> = {
  '-': '⁻',
  '0': '⁰',
  '1': '¹',
  '2': '²',
  '3': '³',
  '4': '⁴',
  '5': '⁵',
  '6': '⁶',
  '7': '⁷',
  '8': '⁸',
  '9': '⁹',
}

/** A number with its unit in running text, as lines show it: `251×10³ mm^4` as `251×10³ mm⁴`, `800 N m` as `800 N·m`. */
export const quantityText = (shown: string): string => {
  const [, number = '', unit = ''] = /^([^\p{L}°%]*)(.*)$/su.exec(shown) ?? []
  return `${number}${unit.replace(/(?<=\S)[ *](?=\S)/g, '·')}`.replace(/\^(-?\d+)/g, (_, power: string) =>
    [...power].map((sign) => raised[sign] ?? sign).join(''),
  )
}
