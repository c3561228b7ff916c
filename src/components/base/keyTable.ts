/** The keys that people can rely on, by where they act. */
export interface KeyRow {
  where: string
  keys: string
  does: string
}

export const keyTable: KeyRow[] = [
  {
    where: 'Sheet',
    keys: 'Ctrl+Enter',
    does: 'List of commands; then a letter: G given, F formula, C criterion, A analysis, H heading, N nomenclature, E next problem',
  },
  { where: 'Line', keys: '↑ ↓', does: 'Previous, next line; with Shift, extend the selection' },
  { where: 'Line', keys: 'Enter or F2', does: 'Open its fields' },
  { where: 'Line', keys: 'Esc or F2', does: 'Back from the fields to the line' },
  { where: 'Line', keys: 'Alt+Shift+↑ ↓', does: 'Move the line' },
  { where: 'Line', keys: 'Ctrl+C, X, V; Delete', does: 'Copy, cut, paste; remove' },
  { where: 'Field', keys: 'Tab, Shift+Tab', does: 'Next, previous field' },
  { where: 'Field', keys: 'Enter', does: 'Done' },
  { where: 'Anywhere', keys: 'Ctrl+Z, Ctrl+Shift+Z', does: 'Undo, redo your own steps' },
]
