import { BLOCK, compileBlock, type Block } from '@shared/engine/evaluate/block'
import { builtins } from '@shared/engine/evaluate/builtins'
import { parseExpression } from '@shared/engine/parse/parse'
import { medians } from '../measure'
import { shownMs, type Row } from '../row'

const SAMPLES = 100_000
const COPIES = 3

/** Ten formulas of a shaft check, for three segments in a row: the torque of each follows from the one before. */
const chain = (i: number): [string, string][] => {
  const torque = i === 0 ? 'T' : `T_${i}`
  return [
    [`A_${i}`, `pi*d_${i}^2/4`],
    [`W_${i}`, `pi*d_${i}^3/16`],
    [`J_${i}`, `pi*d_${i}^4/32`],
    [`tau_${i}`, `${torque}/W_${i}`],
    [`s_${i}`, `P/A_${i}`],
    [`v_${i}`, `sqrt(s_${i}^2 + 3*tau_${i}^2)`],
    [`phi_${i}`, `${torque}*L/(G*J_${i})`],
    [`k_${i}`, `G*J_${i}/L`],
    [`u_${i}`, `(v_${i}/60e6)^2 + abs(phi_${i}/0.02)`],
    [`T_${i + 1}`, `T*(1 + 0.01*u_${i}) + 0.001*k_${i}*phi_${i}`],
  ]
}

const inputs = ['T', 'P', 'L', 'G', 'd_0', 'd_1', 'd_2']

const sampled = (middle: number, seed: number): Float64Array => {
  // A fixed sequence (Park and Miller's minimal standard generator), so that every run sees the same numbers.
  let state = seed
  return Float64Array.from({ length: SAMPLES }, () => {
    state = (state * 48_271) % 2_147_483_647
    return middle * (0.95 + (0.1 * state) / 2_147_483_647)
  })
}

const columnsOfInputs = (): Float64Array[] =>
  [800, 12_000, 1.2, 80e9, 0.06, 0.055, 0.05].map((middle, i) => sampled(middle, 17 + i))

const inBlocks = (given: Float64Array[]): (() => unknown) => {
  const formulas = Array.from({ length: COPIES }, (_, i) => chain(i)).flat()
  const names = [...inputs, ...formulas.map(([symbol]) => symbol)]
  const vocabulary = { isDefined: () => false, functions: builtins }
  const blocks = formulas.map(([symbol, text]): Block => {
    const { parsed } = parseExpression(text, vocabulary)
    if (!parsed) throw new Error(`${symbol} = ${text} cannot be read`)
    return compileBlock(parsed.root, {
      text,
      functions: builtins,
      columnOf: (name) => names.indexOf(name),
      displayFactor: () => 1,
      along: () => () => NaN,
    })
  })
  const out = new Float64Array(SAMPLES)
  const columns: Float64Array[] = names.map(() => new Float64Array(0))
  return () => {
    for (let start = 0; start < SAMPLES; start += BLOCK) {
      const n = Math.min(BLOCK, SAMPLES - start)
      given.forEach((column, i) => (columns[i] = column.subarray(start, start + n)))
      blocks.forEach((block, i) => (columns[inputs.length + i] = block(columns, n)))
      out.set((columns.at(-1) as Float64Array).subarray(0, n), start)
    }
    return out
  }
}

const byHand = ([T, P, L, G, ...diameters]: Float64Array[]): (() => unknown) => {
  const out = new Float64Array(SAMPLES)
  return () => {
    for (let s = 0; s < SAMPLES; s += 1) {
      const length = L?.[s] ?? 0
      const modulus = G?.[s] ?? 0
      let torque = T?.[s] ?? 0
      for (let i = 0; i < COPIES; i += 1) {
        const diameter = diameters[i]?.[s] ?? 0
        const A = (Math.PI * Math.pow(diameter, 2)) / 4
        const W = (Math.PI * Math.pow(diameter, 3)) / 16
        const J = (Math.PI * Math.pow(diameter, 4)) / 32
        const tau = torque / W
        const stress = (P?.[s] ?? 0) / A
        const v = Math.sqrt(Math.pow(stress, 2) + 3 * Math.pow(tau, 2))
        const phi = (torque * length) / (modulus * J)
        const k = (modulus * J) / length
        const u = Math.pow(v / 60e6, 2) + Math.abs(phi / 0.02)
        torque = (T?.[s] ?? 0) * (1 + 0.01 * u) + 0.001 * k * phi
      }
      out[s] = torque
    }
    return out
  }
}

export const monteCarlo: Row = {
  what: '100 000 samples through a chain of 30 formulas',
  baseline: 'the chain written by hand with Math.pow',
  target: '≤ 3×',
  measure: () => {
    const given = columnsOfInputs()
    const ours = inBlocks(given)
    const hand = byHand(given)
    const expected = hand() as Float64Array
    const difference = (ours() as Float64Array).findIndex((value, i) => value !== expected[i])
    if (difference >= 0) throw new Error(`The two chains differ at sample ${difference}.`)
    const [inBlocksMs = NaN, byHandMs = NaN] = medians([{ run: ours }, { run: hand }], 60)
    return {
      ratio: `${(inBlocksMs / byHandMs).toPrecision(3)}×`,
      isReached: inBlocksMs / byHandMs <= 3,
      detail: `${shownMs(inBlocksMs)} against ${shownMs(byHandMs)}; same bits`,
    }
  },
}
