/** Forms that look like calls and whose arguments are more than values. */
import type { ArgumentKind } from '../contracts'
import type { Vocabulary } from './vocabulary'

export interface CallSignature {
  parameters: readonly { name: string; kind?: ArgumentKind; optional?: boolean }[]
  variadic?: boolean
}

/** Their dimension and value are known to the dimension layer and to the graph, not to a library function. */
export const specialForms: ReadonlyMap<string, CallSignature> = new Map<string, CallSignature>([
  ['numerical_value', { parameters: [{ name: 'x' }, { name: 'unit', kind: 'unit' }] }],
  ['at', { parameters: [{ name: 'curve' }, { name: 'x' }] }],
  ['interpolate', { parameters: [{ name: 'table' }, { name: 'x' }, { name: 'y', optional: true }] }],
  ['entry', { parameters: [{ name: 'column' }, { name: 'row', kind: 'grade' }] }],
])

const caseMember: CallSignature = { parameters: [{ name: 'output' }] }

/** `C.max(x)`, `C.min(x)`: the only calls on a member. */
export const isCaseMember = (name: string): boolean => /^[^.]+\.(?:max|min|governing)$/.test(name)

/** How a name is called; undefined where it is a quantity and a bracket after it multiplies. */
export const signatureOf = (name: string, vocabulary: Vocabulary): CallSignature | undefined =>
  specialForms.get(name) ??
  vocabulary.functions.get(name) ??
  (name.includes('.') && isCaseMember(name) ? caseMember : undefined)
