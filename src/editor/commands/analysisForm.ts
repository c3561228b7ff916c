import type { InputSpec, When } from '@shared/engine/contracts'
import type { AnalysisLine } from '@shared/sheet/kinds'

type Inputs = AnalysisLine['inputs']

export interface InputGroup {
  name: string
  /** Essential ones, and those that somebody has changed. */
  shown: InputSpec[]
  /** Inputs that have a default or may stay empty. */
  folded: InputSpec[]
}

const isEmpty = (value: Inputs[string] | undefined): boolean => value === undefined || value.length === 0

/** What an earlier input says, with its default where it says nothing. */
const said = (name: string, specs: readonly InputSpec[], inputs: Inputs): string => {
  const value = inputs[name]
  if (typeof value === 'string' && value !== '') return value
  const spec = specs.find((input) => input.name === name)
  return spec && 'default' in spec && spec.default ? spec.default.text : ''
}

export const applies = (when: When | undefined, specs: readonly InputSpec[], inputs: Inputs): boolean =>
  Object.entries(when ?? {}).every(([name, values]) => values.includes(said(name, specs, inputs)))

/** Inputs that apply now, by group in the order of the spec. */
export const groupInputs = (specs: readonly InputSpec[], inputs: Inputs): InputGroup[] => {
  const groups = new Map<string, InputGroup>()
  for (const input of specs) {
    if (!applies(input.when, specs, inputs)) continue
    const group = groups.get(input.group) ?? { name: input.group, shown: [], folded: [] }
    groups.set(input.group, group)
    ;(input.essential || !isEmpty(inputs[input.name]) ? group.shown : group.folded).push(input)
  }
  return [...groups.values()]
}

export const isUsed = (inputs: Inputs): boolean => Object.values(inputs).some((value) => !isEmpty(value))

/** What was chosen so far, with the default of every choice that says nothing: a sketch needs no more. */
export const choicesOf = (specs: readonly InputSpec[], inputs: Inputs): Record<string, unknown> => ({
  ...inputs,
  ...Object.fromEntries(
    specs.flatMap(({ name, type }) => (type === 'choice' ? [[name, said(name, specs, inputs)]] : [])),
  ),
})
