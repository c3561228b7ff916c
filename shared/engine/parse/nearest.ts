/** Edit distance with exchanged neighbours, given up once it exceeds `most`. */
const distance = (a: string, b: string, most: number): number => {
  if (Math.abs(a.length - b.length) > most) return most + 1
  let before: number[] = []
  let previous = Array.from({ length: b.length + 1 }, (_, j) => j)
  for (let i = 1; i <= a.length; i++) {
    const current = [i]
    let least = i
    for (let j = 1; j <= b.length; j++) {
      const same = a[i - 1] === b[j - 1]
      let cost = Math.min(
        (previous[j] ?? most) + 1,
        (current[j - 1] ?? most) + 1,
        (previous[j - 1] ?? most) + (same ? 0 : 1),
      )
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) {
        cost = Math.min(cost, (before[j - 2] ?? most) + 1)
      }
      current.push(cost)
      least = Math.min(least, cost)
    }
    if (least > most) return most + 1
    before = previous
    previous = current
  }
  return previous[b.length] ?? most + 1
}

/** The names nearest to one that is unknown, best first, at most three; none that is far. */
export const nearestNames = (name: string, known: Iterable<string>): string[] => {
  const most = name.length <= 3 ? 1 : name.length <= 6 ? 2 : 3
  const lower = name.toLowerCase()
  const near: { name: string; away: number }[] = []
  for (const candidate of known) {
    if (candidate === name) continue
    const away =
      candidate.toLowerCase() === lower ||
      candidate.replaceAll('_', '').toLowerCase() === lower.replaceAll('_', '')
        ? 0.5
        : distance(name, candidate, most)
    if (away <= most && away < Math.max(name.length, candidate.length)) near.push({ name: candidate, away })
  }
  near.sort((a, b) => a.away - b.away || (a.name < b.name ? -1 : 1))
  return near.slice(0, 3).map((found) => found.name)
}
