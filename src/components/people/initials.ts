/** Two letters for a person: of the first and the last word of the name. */
export const initialsOf = (name: string): string => {
  const words = name.trim().split(/\s+/).filter(Boolean)
  const letters = [words[0], words.length > 1 ? words.at(-1) : undefined]
  return (
    letters
      .map((word) => [...(word ?? '')][0] ?? '')
      .join('')
      .toUpperCase() || '?'
  )
}
