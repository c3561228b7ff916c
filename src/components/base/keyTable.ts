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
    does: 'List of commands; then a letter. Lines: G given, F formula, C criterion, A analysis. Text: H heading, 1 2 3 its level, 0 plain text, B bullets, O numbers, W table, K link, Q quoted value, Y reference to a line. N nomenclature, E next problem, Shift+E previous',
  },
  { where: 'Text', keys: 'Ctrl+B, I, E, K', does: 'Bold, italic, code, link' },
  { where: 'Text', keys: 'Ctrl+Shift+8, 7', does: 'Bullets, numbers' },
  {
    where: 'Table',
    keys: 'Enter',
    does: 'The cell below; in the last row, a new row; in an empty last row, leave the table',
  },
  { where: 'Table', keys: '↑ ↓ ← →', does: 'From cell to cell' },
  { where: 'Line', keys: '↑ ↓', does: 'Previous, next line; with Shift, extend the selection' },
  { where: 'Line', keys: 'Enter or F2', does: 'Open its fields' },
  { where: 'Line', keys: 'Esc or F2', does: 'Back from the fields to the line' },
  { where: 'Line', keys: 'Alt+Shift+↑ ↓', does: 'Move the line' },
  { where: 'Line', keys: 'Ctrl+C, X, V; Delete', does: 'Copy, cut, paste; remove' },
  { where: 'Field', keys: 'Tab, Shift+Tab', does: 'Next, previous field' },
  { where: 'Field', keys: 'Enter', does: 'Done' },
  { where: 'Anywhere', keys: 'Ctrl+Z, Ctrl+Shift+Z', does: 'Undo, redo your own steps' },
]
