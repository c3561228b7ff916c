/** What the evaluate command was asked for, or what is wrong with that. */
export interface EvaluateArguments {
  file: string
  /** `d_o=65mm`, split at the first equals sign. */
  givens: { symbol: string; text: string }[]
  json: boolean
}

export const usage = 'npm run -s evaluate -- FILE.md [--given d_o=65mm]… [--json]'

export type ArgumentsReading =
  { arguments: EvaluateArguments; message?: undefined } | { message: string; json: boolean }

export const readArguments = (words: readonly string[]): ArgumentsReading => {
  const files: string[] = []
  const givens: EvaluateArguments['givens'] = []
  const json = words.includes('--json')
  const refuse = (message: string): ArgumentsReading => ({ message, json })
  const rest = [...words]
  for (let word = rest.shift(); word !== undefined; word = rest.shift()) {
    if (word === '--json') continue
    if (word === '--given' || word.startsWith('--given=')) {
      const text = word === '--given' ? rest.shift() : word.slice('--given='.length)
      const equals = text?.indexOf('=') ?? -1
      if (text === undefined || equals < 1 || equals === text.length - 1) {
        return refuse(
          `--given takes a symbol and a value, as in --given d_o=65mm${text ? `; it got “${text}”` : ''}.`,
        )
      }
      givens.push({ symbol: text.slice(0, equals).trim(), text: text.slice(equals + 1).trim() })
    } else if (word.startsWith('--')) return refuse(`There is no option ${word}.`)
    else files.push(word)
  }
  const [file, ...others] = files
  if (file === undefined) return refuse('No file was named.')
  if (others.length > 0) return refuse(`One file at a time: ${files.join(', ')} are ${files.length}.`)
  return { arguments: { file, givens, json } }
}
