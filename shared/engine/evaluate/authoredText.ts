import type { EngineLine } from '../contracts'

/** The text of an authored field by its path: `expression`, `inputs.outer`, `inputs.segments.2.length`. */
export const authoredText = (line: EngineLine, path: string): string | undefined => {
  const [first = '', input = '', row, column] = path.split('.')
  if (first !== 'inputs') {
    const value: unknown = Reflect.get(line, first)
    return typeof value === 'string' ? value : undefined
  }
  if (line.kind !== 'analysis') return undefined
  const value = line.inputs[input]
  if (typeof value === 'string') return value
  return value?.find(({ name }) => name === row)?.cells[column ?? '']
}
