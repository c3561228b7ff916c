import { describe, expect, test } from 'vitest'
import type { InputSpec } from '@shared/engine/contracts'
import { dimensionless } from '@shared/engine/dimensions/dimension'
import { groupInputs } from '@/editor/commands/analysisForm'

const unit = { SI: '', US: '' }
const quantity = (name: string, more: Partial<InputSpec> = {}): InputSpec =>
  ({
    type: 'quantity',
    name,
    label: name,
    help: '',
    group: 'Size',
    essential: true,
    dimension: dimensionless,
    unit,
    ...more,
  }) as InputSpec

const specs: InputSpec[] = [
  {
    type: 'choice',
    name: 'shape',
    label: 'Shape',
    help: '',
    group: 'Shape',
    essential: true,
    choices: [
      { value: 'solid', label: 'Solid' },
      { value: 'hollow', label: 'Hollow' },
    ],
    default: { text: 'solid', basis: 'the usual one' },
  },
  quantity('d_o'),
  quantity('d_i', { when: { shape: ['hollow'] } }),
  quantity('fillet', { essential: false }),
]

const shown = (inputs: Record<string, string>) =>
  groupInputs(specs, inputs).map(({ name, shown, folded }) => [
    name,
    shown.map((one) => one.name),
    folded.map((one) => one.name),
  ])

describe('the form of an analysis', () => {
  test('inputs stand in their groups; seldom needed ones are folded', () => {
    expect(shown({})).toEqual([
      ['Shape', ['shape'], []],
      ['Size', ['d_o'], ['fillet']],
    ])
  })

  test('an input shows only where an earlier one says so; a default counts as said', () => {
    expect(shown({ shape: 'hollow' })[1]).toEqual(['Size', ['d_o', 'd_i'], ['fillet']])
  })

  test('a changed input is never folded away', () => {
    expect(shown({ fillet: '2 mm' })[1]).toEqual(['Size', ['d_o', 'fillet'], []])
  })
})
