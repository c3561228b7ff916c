/** Destinations of links with our own schemes: `value:N m;digits=4` and `line:<id>`. */
import type { Inline } from '../sheet'

const encode = (text: string): string =>
  text.replace(
    /%(?=[0-9A-Fa-f]{2})|[;\t\r\n]/g,
    (character) => `%${character.charCodeAt(0).toString(16).toUpperCase().padStart(2, '0')}`,
  )

const decode = (text: string): string =>
  text.replace(/%([0-9A-Fa-f]{2})/g, (_, code: string) => String.fromCharCode(Number.parseInt(code, 16)))

export const valueDestination = (quote: Extract<Inline, { type: 'quote' }>): string =>
  `value:${encode(quote.unit ?? '')}${quote.digits === undefined ? '' : `;digits=${quote.digits}`}`

/** The quoted value, or what is wrong with the link. */
export const readValueLink = (label: string, destination: string): Inline | string => {
  const [unit = '', ...settings] = destination.slice('value:'.length).split(';')
  if (label === '' || label.length > 200)
    return 'A quoted value names its symbol in the square brackets: [T](value:).'
  if (unit.length > 300) return 'The unit of a quoted value is at most 100 characters long.'
  const quote: Inline = { type: 'quote', symbol: label }
  if (unit !== '') quote.unit = decode(unit)
  for (const setting of settings) {
    const digits = /^\s*digits\s*=\s*(\d{1,2})\s*$/.exec(setting)
    const count = Number(digits?.[1])
    if (!(count >= 1 && count <= 15))
      return 'A quoted value takes digits=1 to digits=15: [T](<value:N m;digits=4>).'
    quote.digits = count
  }
  return quote
}

export const lineDestination = (lineId: string): string => `line:${encode(lineId)}`

/** The id that a reference names, empty where its label is the line's symbol. */
export const readLineLink = (destination: string): string =>
  decode(destination.slice('line:'.length)).slice(0, 64)
