/** What can be wrong with the inputs of an analysis. Paths name inputs as in the spec, rows by their name. */
import type { Dimension, LooseProblem } from '../../contracts'
import { inWords } from '../../dimensions/words'
import { nearestNames } from '../../parse/nearest'

const at = (path: string) => ({ field: `inputs.${path}` })

export const unknownKind = (kind: string, known: Iterable<string>): LooseProblem => {
  if (kind.trim() === '')
    return { code: 'missing-input', message: 'Choose a kind of analysis.', span: { field: 'analysis' } }
  const near = nearestNames(kind, known)
  return {
    code: 'invalid-field',
    message: `There is no analysis named ${kind} in this version; the line is kept as it is.`,
    span: { field: 'analysis' },
    repairs: near.map((name) => ({ label: `Use ${name}`, fields: { analysis: name } })),
  }
}

export const missingInput = (path: string, label: string): LooseProblem => ({
  code: 'missing-input',
  message: `${label} is missing.`,
  span: at(path),
})

export const unknownInput = (path: string, known: Iterable<string>): LooseProblem => {
  const name = path.split('.').at(-1) ?? path
  const near = nearestNames(name, known)
  const suggestion = near.length > 0 ? ` Did you mean ${near.join(' or ')}?` : ''
  return {
    code: 'invalid-field',
    message: `This analysis has no input named ${name}.${suggestion}`,
    span: at(path),
  }
}

export const notAChoice = (
  path: string,
  label: string,
  value: string,
  choices: readonly string[],
): LooseProblem => ({
  code: 'invalid-field',
  message: `${label} cannot be ${value}: choose one of ${choices.join(', ')}.`,
  span: at(path),
  repairs: nearestNames(value, choices).map((choice) => ({
    label: `Use ${choice}`,
    fields: { [`inputs.${path}`]: choice },
  })),
})

export const notAnInteger = (path: string, label: string, value: string): LooseProblem => ({
  code: 'invalid-field',
  message: `${label} must be a whole number; this is ${value}.`,
  span: at(path),
})

export const tooLong = (path: string, label: string, most: number): LooseProblem => ({
  code: 'limit-exceeded',
  message: `${label} has at most ${most} characters.`,
  span: at(path),
})

export const notATable = (path: string, label: string): LooseProblem => ({
  code: 'invalid-field',
  message: `${label} is a table: it takes rows, not a single value.`,
  span: at(path),
})

export const notASingleValue = (path: string, label: string): LooseProblem => ({
  code: 'invalid-field',
  message: `${label} takes a single value, not rows.`,
  span: at(path),
})

export const tooFewRows = (path: string, label: string, least: number): LooseProblem => ({
  code: 'missing-input',
  message: `${label}: at least ${least} ${least === 1 ? 'row is' : 'rows are'} needed.`,
  span: at(path),
})

export const tooManyRows = (path: string, label: string, most: number): LooseProblem => ({
  code: 'limit-exceeded',
  message: `${label}: at most ${most} rows.`,
  span: at(path),
})

export const repeatedRow = (path: string, label: string, name: string): LooseProblem => ({
  code: 'invalid-field',
  message: `${label}: two rows are named ${name}.`,
  span: at(path),
})

export const wrongDimension = (
  path: string,
  label: string,
  expected: Dimension,
  found: Dimension,
): LooseProblem => ({
  code: 'dimension-mismatch',
  message: `${label} must be ${inWords(expected)}; this is ${inWords(found)}.`,
  span: at(path),
})

export const outsideLimits = (path: string, label: string, rule: string, shown: string): LooseProblem => ({
  code: 'out-of-range',
  message: `${label} must be ${rule}; it is ${shown}.`,
  span: at(path),
})

export const notAnAnalysis = (
  path: string,
  label: string,
  symbol: string,
  kinds: readonly string[],
): LooseProblem => ({
  code: 'invalid-field',
  message: `${label} must name an analysis of the kind ${kinds.join(' or ')}; ${symbol} is none.`,
  span: at(path),
})

export const outputNotFinite = (symbol: string, name: string): LooseProblem => ({
  code: 'not-finite',
  message: `${symbol}.${name} has no finite value with these inputs.`,
})

/** A fault of the program, not of its input: said as such, and the sheet goes on. */
export const analysisFailed = (title: string, reason: string): LooseProblem => ({
  code: 'domain',
  message: `${title} could not be computed with these inputs (${reason}). Please report this: a named problem should stand here.`,
})
