import type { LineKind } from '@shared/sheet/kinds'
import type { TextAct } from './prose'

/** The commands of the sheet, each with its letter after Ctrl+Enter. */
export type Command = { letter: string; label: string; group: CommandGroup } & (
  | { does: 'insert'; kind: LineKind }
  | { does: 'text'; act: TextAct }
  | { does: 'heading' | 'quote' | 'reference' | 'nomenclature' | 'next-problem' | 'previous-problem' }
)

export type CommandGroup = 'Lines' | 'Text' | 'Go to'

const insert = (letter: string, label: string, kind: LineKind): Command => ({
  letter,
  label,
  group: 'Lines',
  does: 'insert',
  kind,
})
const text = (letter: string, label: string, act: TextAct): Command => ({
  letter,
  label,
  group: 'Text',
  does: 'text',
  act,
})

export const commandTable: readonly Command[] = [
  insert('G', 'Given', 'given'),
  insert('F', 'Formula', 'formula'),
  insert('C', 'Criterion', 'criterion'),
  insert('A', 'Analysis', 'analysis'),
  { letter: 'H', label: 'Heading', group: 'Text', does: 'heading' },
  text('1', 'Make it a heading, level 1', 'heading-1'),
  text('2', 'Make it a heading, level 2', 'heading-2'),
  text('3', 'Make it a heading, level 3', 'heading-3'),
  text('0', 'Make it plain text', 'paragraph'),
  text('B', 'Bullets', 'bullets'),
  text('O', 'Numbers', 'numbers'),
  text('W', 'Table', 'table'),
  text('K', 'Link', 'link'),
  { letter: 'Q', label: 'Quote a value', group: 'Text', does: 'quote' },
  { letter: 'Y', label: 'Refer to a line', group: 'Text', does: 'reference' },
  { letter: 'N', label: 'Nomenclature', group: 'Go to', does: 'nomenclature' },
  { letter: 'E', label: 'Next problem', group: 'Go to', does: 'next-problem' },
  { letter: 'Shift+E', label: 'Previous problem', group: 'Go to', does: 'previous-problem' },
]

export const commandGroups: readonly CommandGroup[] = ['Lines', 'Text', 'Go to']

/** The command of a key pressed in the list; undefined for any other key. */
export const commandOf = (key: string, isShifted: boolean): Command | undefined => {
  const letter = isShifted ? `Shift+${key.toUpperCase()}` : key.toUpperCase()
  return (
    commandTable.find((command) => command.letter === letter) ??
    commandTable.find((command) => isShifted && command.letter === key.toUpperCase())
  )
}
