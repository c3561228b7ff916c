import type { LineKind } from '@shared/sheet/kinds'

/** The commands of the sheet, each with its letter after Ctrl+Enter. */
export type Command =
  | { letter: string; label: string; does: 'insert'; kind: LineKind }
  | {
      letter: string
      label: string
      does: 'heading' | 'quote' | 'reference' | 'nomenclature' | 'next-problem' | 'previous-problem'
    }

export const commandTable: readonly Command[] = [
  { letter: 'G', label: 'Given', does: 'insert', kind: 'given' },
  { letter: 'F', label: 'Formula', does: 'insert', kind: 'formula' },
  { letter: 'C', label: 'Criterion', does: 'insert', kind: 'criterion' },
  { letter: 'A', label: 'Analysis', does: 'insert', kind: 'analysis' },
  { letter: 'H', label: 'Heading', does: 'heading' },
  { letter: 'Q', label: 'Quote a value in the text', does: 'quote' },
  { letter: 'Y', label: 'Refer to a line in the text', does: 'reference' },
  { letter: 'N', label: 'Nomenclature', does: 'nomenclature' },
  { letter: 'E', label: 'Next problem', does: 'next-problem' },
  { letter: 'Shift+E', label: 'Previous problem', does: 'previous-problem' },
]

/** The command of a key pressed in the list; undefined for any other key. */
export const commandOf = (key: string, isShifted: boolean): Command | undefined => {
  const letter = isShifted ? `Shift+${key.toUpperCase()}` : key.toUpperCase()
  return (
    commandTable.find((command) => command.letter === letter) ??
    commandTable.find((command) => isShifted && command.letter === key.toUpperCase())
  )
}
