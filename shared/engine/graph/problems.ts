/** What can be wrong between lines: names that nobody or two define, circles, order. Said once, in words. */
import type { LineId, LooseProblem, Repair, Span } from '../../errors/problem'

/** Replaces what a span marks by another name. */
const replacement = (span: Span, text: string | undefined, name: string): Repair[] => {
  if (text === undefined) return []
  const { from = 0, to = text.length } = span
  return [{ label: `Use ${name}`, fields: { [span.field]: text.slice(0, from) + name + text.slice(to) } }]
}

const didYouMean = (near: readonly string[]): string =>
  near.length === 0 ? '' : ` Did you mean ${near.join(' or ')}?`

/** @param text the whole text of the field that the span marks */
export const unknownSymbol = (
  name: string,
  near: readonly string[],
  span: Span | undefined,
  text: string | undefined,
  /** What else the name may mean, as a sentence. */
  hint = '',
): LooseProblem => ({
  code: 'unknown-symbol',
  message: `${name} is not defined in this sheet.${didYouMean(near)}${hint && ` ${hint}`}`,
  ...(span && { span, repairs: near.flatMap((candidate) => replacement(span, text, candidate)) }),
})

export const unknownMember = (
  owner: string,
  member: string,
  near: readonly string[],
  span: Span | undefined,
  text: string | undefined,
): LooseProblem => ({
  code: 'unknown-symbol',
  message: `${owner} has no value named ${member}.${didYouMean(near.map((name) => `${owner}.${name}`))}`,
  ...(span && {
    span,
    repairs: near.flatMap((candidate) => replacement(span, text, `${owner}.${candidate}`)),
  }),
})

export const inapplicableMember = (owner: string, member: string, span: Span | undefined): LooseProblem => ({
  code: 'unknown-symbol',
  message: `${owner} has no ${member} with these inputs.`,
  ...(span && { span }),
})

/** @param what completes *C1 is …*: `a criterion` */
export const nothingToRead = (symbol: string, what: string, span: Span | undefined): LooseProblem => ({
  code: 'unknown-symbol',
  message: `${symbol} is ${what}: it has no value that can be read here.`,
  ...(span && { span }),
})

export const memberWanted = (
  symbol: string,
  members: readonly string[],
  span: Span | undefined,
): LooseProblem => ({
  code: 'unknown-symbol',
  message: `${symbol} is an analysis. Read one of its values, such as ${symbol}.${members[0] ?? 'tau_max'}.`,
  ...(span && { span }),
})

export const duplicateSymbol = (name: string, free: string): LooseProblem => ({
  code: 'duplicate-symbol',
  message: `${name} is defined further up already; that definition counts. Give this line another symbol.`,
  span: { field: 'symbol' },
  repairs: [{ label: `Name it ${free}`, fields: { symbol: free } }],
})

/** A longer circle names this many of its lines: each of them carries the message. */
const NAMED = 20

const listed = (names: readonly string[]): string => {
  if (names.length > NAMED) return `${names.slice(0, NAMED).join(', ')} and ${names.length - NAMED} more`
  return `${names.slice(0, -1).join(', ')} and ${names.at(-1)}`
}

export const circular = (names: readonly string[], span: Span | undefined): LooseProblem => ({
  code: 'circular',
  message:
    names.length === 1
      ? `${names[0]} is computed from itself.`
      : `${listed(names)} are computed from one another in a circle.`,
  ...(span && { span }),
})

export const usedBeforeDefined = (name: string, span: Span | undefined): LooseProblem => ({
  code: 'used-before-defined',
  severity: 'advisory',
  message: `${name} is defined further down: who reads from the top meets it here first.`,
  ...(span && { span }),
})

export const contested: LooseProblem = {
  code: 'contested',
  message:
    'Two people changed this line while one was offline. It computes with one version; choose which one stays.',
}

/** An empty id asks for a new one. */
export const repeatedLine = (id: LineId): LooseProblem => ({
  code: 'repeated-line',
  message: 'This line stands in the sheet twice; the first place counts.',
  repairs: [{ label: 'Make it a line of its own', lineId: id, fields: { id: '' } }],
})

export const invalidSymbol = (message: string, isMissing: boolean): LooseProblem => ({
  code: isMissing ? 'missing-input' : 'invalid-field',
  message,
  span: { field: 'symbol' },
})
