import type { Given } from '@shared/sheet/kinds'
import type { Block, Sheet } from '@shared/sheet/sheet'
import { unusable } from '../refusals'
import type { FieldMessage } from '../refusals'
import type { LoadedTemplate } from './library'

const quantity = /^\s*([+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?)\s*(\D.*)?$/su

/**
 * A template's sheet with the givens that were filled in, each line knowing where it came from. A number
 * without a unit is in the template's unit.
 * @param givens by symbol, as typed: `60 mm`
 * @throws {Refusal} unusable, with a message for each given that does not fit
 */
export const fillTemplate = (template: LoadedTemplate, givens: Record<string, string>): Sheet => {
  const wrong: FieldMessage[] = []
  const left = new Set(Object.keys(givens))
  const blocks = template.sheet.blocks.map((block): Block => {
    if (block.type !== 'line') return block
    const { line } = block
    // By symbol, not by id: a text form need not name its lines, and then ids differ from reading to reading.
    const origin = { template: template.name, edition: template.edition, line: line.symbol || line.id }
    const typed = line.kind === 'given' ? givens[line.symbol] : undefined
    if (line.kind !== 'given' || typed === undefined) return { type: 'line', line: { ...line, origin } }
    left.delete(line.symbol)
    const filled = fillGiven(line, typed)
    if (typeof filled === 'string') wrong.push({ path: `givens.${line.symbol}`, message: filled })
    return { type: 'line', line: { ...line, ...(typeof filled === 'string' ? {} : filled), origin } }
  })
  for (const symbol of left)
    wrong.push({ path: `givens.${symbol}`, message: `The template has no given called ${symbol}.` })
  if (wrong.length > 0)
    throw unusable(
      wrong.length === 1
        ? `One given cannot be used. ${wrong[0]?.message ?? ''}`
        : `${wrong.length} givens cannot be used.`,
      wrong,
    )
  return { front: template.sheet.front, blocks }
}

const fillGiven = (line: Given, typed: string): Pick<Given, 'value' | 'unit'> | string => {
  const [, value, unit] = quantity.exec(typed) ?? []
  if (value === undefined) return `${line.symbol} needs a number and its unit, as ${exampleOf(line)}.`
  const filled = { value, unit: unit?.trim() || line.unit }
  if (
    line.choices?.length &&
    !line.choices.some((choice) => choice === typed.trim() || Number(choice) === Number(value))
  )
    return `${line.symbol} must be one of ${line.choices.join(', ')}.`
  // In another unit the sheet itself compares with the range, after converting.
  return filled.unit === line.unit ? (outsideRange(line, Number(value)) ?? filled) : filled
}

const exampleOf = ({ value, unit }: Given): string => (value === '' ? '60 mm' : `${value} ${unit}`.trim())

const outsideRange = ({ symbol, unit, range }: Given, value: number): string | undefined => {
  const from = range?.from === undefined ? Number.NaN : Number(range.from)
  const to = range?.to === undefined ? Number.NaN : Number(range.to)
  if (value < from) return `${symbol} must be at least ${from} ${unit}.`.replace(' .', '.')
  if (value > to) return `${symbol} must be at most ${to} ${unit}.`.replace(' .', '.')
  return undefined
}
