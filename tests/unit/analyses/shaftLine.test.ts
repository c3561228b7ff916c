import { expect, test } from 'vitest'
import { shaftLine } from '@shared/analyses/shaft-line'
import { section } from '@shared/analyses/section'
import { MethodProblem } from '@shared/engine/contracts'
import type { SolvedInput } from '@shared/engine/contracts'
import { expectRelative } from '../../support/relative'

const mm = 1e-3
const rows = (list: Record<string, SolvedInput>[]) =>
  list.map((cells, i) => ({ name: String(i + 1), ...cells })) as SolvedInput

const stepped = {
  G: 80e9,
  start: 'fixed',
  end: 'free',
  segments: rows([
    { length: 400 * mm, d: 60 * mm, r: 2 * mm },
    { length: 300 * mm, d: 40 * mm },
  ]),
  torques: rows([
    { x: 400 * mm, T: 800 },
    { x: 700 * mm, T: 400 },
  ]),
}

const problemOf = (inputs: Record<string, SolvedInput>): MethodProblem => {
  try {
    shaftLine.solve({ ...stepped, ...inputs })
  } catch (problem) {
    if (problem instanceof MethodProblem) return problem
    throw problem
  }
  throw new Error('There was no problem.')
}

test('a stepped shaft has nominal stress in each segment and its peak at the step', () => {
  const { outputs, places } = shaftLine.solve(stepped)
  expectRelative(outputs['tau_peak_1'], (outputs['K_ts_1'] ?? 0) * (outputs['tau_2'] ?? 0), 1e-12)
  expect(outputs['T_max']).toBe(1200)
  expect(places?.['tau_max']).toBe('segment 2')
  expect(outputs['T_end']).toBeUndefined()
})

test('a torque within a segment makes two pieces of it', () => {
  const { outputs, along } = shaftLine.solve({
    ...stepped,
    torques: rows([{ x: 200 * mm, T: 500 }]),
  })
  expect(along?.['T']?.(0.1)).toBe(500)
  expect(along?.['T']?.(0.3)).toBe(0)
  expectRelative(outputs['phi_end'], (500 * 0.2) / (80e9 * (Math.PI / 32) * 0.06 ** 4), 1e-12)
})

test('at a jump, the side of greater magnitude is answered; outside the line, nothing', () => {
  const { along } = shaftLine.solve(stepped)
  expect(along?.['T']?.(0.4)).toBe(1200)
  expect(() => along?.['phi']?.(0.71)).toThrow('outside the line')
  expect(() => along?.['T']?.(-0.01)).toThrow('outside the line')
})

test('a segment can have the section of another line', () => {
  const square = section.solve({ shape: 'rectangle', a: 40 * mm, b: 40 * mm })
  const reference = { symbol: 'S1', kind: 'section', outputs: square.outputs, inputs: {} }
  const { outputs } = shaftLine.solve({
    ...stepped,
    segments: rows([{ length: 500 * mm, section: reference }]),
    torques: rows([{ x: 500 * mm, T: 100 }]),
  })
  expectRelative(outputs['tau_1'], 100 / (square.outputs['W_t'] ?? NaN), 1e-12)
})

test('both ends free: balanced torques twist the line, unbalanced ones are refused', () => {
  const balanced = shaftLine.solve({
    ...stepped,
    start: 'free',
    torques: rows([
      { x: 0, T: -300 },
      { x: 700 * mm, T: 300 },
    ]),
  })
  expect(balanced.outputs['T_max']).toBe(300)
  const problem = problemOf({ start: 'free' })
  expect(problem.message).toContain('Both ends are free and the torques do not balance')
  expect(problem.input).toBe('torques')
})

test('a fixed end instead of a fixed start is the mirror image', () => {
  const mirrored = shaftLine.solve({
    ...stepped,
    start: 'free',
    end: 'fixed',
    segments: rows([
      { length: 300 * mm, d: 40 * mm, r: 2 * mm },
      { length: 400 * mm, d: 60 * mm },
    ]),
    torques: rows([
      { x: 0, T: 400 },
      { x: 300 * mm, T: 800 },
    ]),
  })
  const { outputs } = shaftLine.solve(stepped)
  expectRelative(mirrored.outputs['phi_max'], outputs['phi_max'] ?? NaN, 1e-12)
  expectRelative(mirrored.outputs['tau_peak_1'], outputs['tau_peak_1'] ?? NaN, 1e-12)
  expectRelative(mirrored.outputs['T_end'], -1200, 1e-12)
})

test.each([
  [
    'a bore larger than the outside',
    { segments: rows([{ length: 0.1, d: 0.04, d_i: 0.05 }]) },
    'The bore of segment 1 must be smaller',
    'segments.1.d_i',
  ],
  [
    'a segment without a section',
    { segments: rows([{ length: 0.1 }]) },
    'needs an outside diameter or a section line',
    'segments.1.d',
  ],
  [
    'a torque beyond the end',
    { torques: rows([{ x: 0.8, T: 1 }]) },
    'lies beyond the end of the line',
    'torques.1.x',
  ],
  ['no shear modulus', { G: undefined }, 'Give the shear modulus', 'G'],
  [
    'a fillet beyond its fits',
    {
      segments: rows([
        { length: 0.1, d: 0.06, r: 0.0001 },
        { length: 0.1, d: 0.04 },
      ]),
      torques: rows([{ x: 0.2, T: 1 }]),
    },
    'Without a radius, the stress there is nominal',
    'segments.1.r',
  ],
])('%s is a named problem on its input', (_case, inputs, message, input) => {
  const problem = problemOf(inputs)
  expect(problem.message).toContain(message)
  expect(problem.input).toBe(input)
})

test('a step without a radius and a radius without a step are said', () => {
  const { advisories } = shaftLine.solve({
    ...stepped,
    segments: rows([
      { length: 400 * mm, d: 60 * mm },
      { length: 300 * mm, d: 40 * mm, r: 1 * mm },
    ]),
  })
  expect(advisories?.map(({ message }) => message)).toEqual([
    'The step after segment 1 has no fillet radius: the stress there is nominal, without its peak.',
    'There is no step after segment 2: its fillet radius is not used.',
  ])
})
