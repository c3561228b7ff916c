/** The compact form of one line, as typed in a paragraph or in a block of the text form. */
import { readCriterion } from './compact/criterion'
import { readDefinition } from './compact/definition'
import { divisionOf } from './compact/division'
import { none, type CompactContext, type CompactFields, type CompactReading } from './compact/fields'
import { splitTail } from './compact/tail'
import { written } from './compact/write'
import { readSymbolName } from './symbolName'

export type * from './compact/fields'
export type { CompactTail } from './compact/tail'

/** `C1: …`: the symbol of a criterion and what stands behind it. */
const labelled = (
  statement: string,
  context: CompactContext,
): { symbol: string; rest: string } | undefined => {
  if (context.block === 'given' || context.block === 'formula') return undefined
  const label = /^([\p{L}_][\p{L}\p{N}_'′]*)\s*:\s*(?=\S)/u.exec(statement)
  const { name } = readSymbolName(label?.[1] ?? '', context.functions)
  return label === null || name === undefined
    ? undefined
    : { symbol: name, rest: statement.slice(label[0].length) }
}

/** Reads the text of a whole paragraph, or one line of a compact block. */
export const readCompact = (text: string, context: CompactContext): CompactReading => {
  const { block } = context
  const split = splitTail(text.replaceAll('\t', ' '))
  if (split === undefined) return none('The braces at the end hold no fields. Write {key=value}.')
  const { statement, tail } = split
  const label = labelled(statement, context)
  if (label) return readCriterion(label.rest, label.symbol, tail, context)
  if (block === 'criterion') return readCriterion(statement, '', tail, context)
  const division = divisionOf(statement)
  if (division === undefined) {
    return none(
      block === undefined
        ? 'This is ordinary text.'
        : `This is ordinary text. A ${block} is written symbol = …; a line of three backticks ends the block.`,
    )
  }
  if (division.sign !== '=') {
    return block === undefined
      ? readCriterion(statement, '', tail, context)
      : none(`A ${block} is written symbol = …`)
  }
  const left = statement.slice(0, division.at).trim()
  const right = statement.slice(division.at + 1).trim()
  if (right === '') return none('The right side is missing.')
  return readDefinition(left, right, tail, context)
}

/** Equal for equal fields, in whatever order they were set. */
const fingerprint = (value: unknown): string =>
  JSON.stringify(value, (_key, part: unknown) =>
    part !== null && typeof part === 'object' && !Array.isArray(part)
      ? Object.fromEntries(Object.entries(part).sort(([a], [b]) => (a < b ? -1 : 1)))
      : part,
  )

/** The one-line form that `readCompact` reads as the same fields; undefined where only YAML can hold them. */
export const writeCompact = (fields: CompactFields): string | undefined => {
  const text = written(fields)
  if (/[\r\n\u2028\u2029]/u.test(text)) return undefined
  const back = readCompact(text, { isDefined: () => false, block: fields.kind })
  return back.reading === 'line' && fingerprint(back.line) === fingerprint(fields) ? text : undefined
}
