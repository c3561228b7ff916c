const dayMs = 24 * 60 * 60 * 1000

/** `2026-12-04` as an instant: noon in UTC, so that no zone moves it to another day. */
const noon = (day: string): Date => new Date(`${day}T12:00:00Z`)

export interface DueWords {
  text: string
  isLate: boolean
}

/**
 * When a calculation is wanted, in words: *due today*, *due Friday* within six days, *due 12 December*
 * beyond, *3 days late* after it. `today` and `dueOn` are days of the firm, as `2026-12-04`.
 */
export const dueWords = (dueOn: string, today: string): DueWords => {
  const days = Math.round((noon(dueOn).getTime() - noon(today).getTime()) / dayMs)
  if (days < 0) return { text: days === -1 ? '1 day late' : `${-days} days late`, isLate: true }
  if (days === 0) return { text: 'due today', isLate: false }
  if (days === 1) return { text: 'due tomorrow', isLate: false }
  const sameYear = dueOn.slice(0, 4) === today.slice(0, 4)
  const form: Intl.DateTimeFormatOptions =
    days < 7
      ? { weekday: 'long' }
      : { day: 'numeric', month: 'long', ...(sameYear ? {} : { year: 'numeric' }) }
  return {
    text: `due ${new Intl.DateTimeFormat('en-GB', { ...form, timeZone: 'UTC' }).format(noon(dueOn))}`,
    isLate: false,
  }
}
