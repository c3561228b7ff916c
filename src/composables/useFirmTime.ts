import { useNow } from '@vueuse/core'
import { computed } from 'vue'
import { useSessionStore } from '@/stores/session'
import { dueWords } from './dueWords'

/** Instants and days as the firm reads them: kept in UTC, shown in the firm's time zone. */
export const useFirmTime = () => {
  const session = useSessionStore()
  const now = useNow({ interval: 60_000 })

  const format = (options: Intl.DateTimeFormatOptions) =>
    computed(() => new Intl.DateTimeFormat('en-GB', { ...options, timeZone: session.timeZone }))
  const dayForm = format({ day: 'numeric', month: 'short', year: 'numeric' })
  const timeForm = format({ hour: '2-digit', minute: '2-digit' })
  // Swedish writes days as ISO 8601 does.
  const isoDay = (instant: Date) =>
    new Intl.DateTimeFormat('sv-SE', { timeZone: session.timeZone }).format(instant)
  const today = computed(() => isoDay(now.value))

  /** *4 Dec 2026*. */
  const day = (instant: string): string => dayForm.value.format(new Date(instant))
  /** *14:02*. */
  const time = (instant: string | Date): string => timeForm.value.format(new Date(instant))
  /** *14:02* for today, *4 Dec 2026* for any other day. */
  const when = (instant: string): string =>
    isoDay(new Date(instant)) === today.value ? time(instant) : day(instant)
  const due = (dueOn: string) => dueWords(dueOn, today.value)

  return { day, time, when, due, today }
}
