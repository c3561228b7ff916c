/** The cells of a table's row as typed; `\|` is a bar within a cell. Same reading as the Markdown parser's. */
export const splitRow = (line: string): string[] => {
  const cells: string[] = []
  let cell = ''
  let escaped = false
  for (const character of line.replace(/^[\s>]+/, '').trim()) {
    if (character === '|' && !escaped) {
      cells.push(cell)
      cell = ''
    } else cell = character === '|' ? `${cell.slice(0, -1)}|` : cell + character
    escaped = character === '\\'
  }
  cells.push(cell)
  if (cells[0] === '') cells.shift()
  if (cells.at(-1) === '') cells.pop()
  return cells.map((text) => text.trim())
}
