import { may, type Action, type Permission } from '@shared/review/permissions'
import type { Me } from '@shared/api/session'
import { defineStore } from 'pinia'
import { computed, ref } from 'vue'
import { readSession } from '@/api/session'

/** Who is signed in, in which firm, and what that person may do in it. Asked for once, on the first page. */
export const useSessionStore = defineStore('session', () => {
  const me = ref<Me | null>(null)
  const isDemo = ref(false)
  const needsFirstFirm = ref(false)
  /** Why the server could not be asked. */
  const failure = ref<Error | null>(null)
  /** True where the server ended the session: then the way back is kept. */
  const hasLapsed = ref(false)
  let asked: Promise<void> | null = null

  const ask = async () => {
    try {
      const status = await readSession()
      me.value = status.me
      isDemo.value = status.demo
      needsFirstFirm.value = status.needsSetup
      failure.value = null
    } catch (error) {
      failure.value = error instanceof Error ? error : new Error(String(error))
      asked = null
    }
  }
  /** Asks the server unless it is known already; never throws, see `failure`. */
  const know = (): Promise<void> => (asked ??= ask())

  /** Takes up what a sign-in, a choice of firm or the first firm answered. */
  const begin = (person: Me) => {
    me.value = person
    hasLapsed.value = false
    needsFirstFirm.value = false
  }
  const end = (lapsed = false) => {
    hasLapsed.value = lapsed && me.value !== null
    me.value = null
  }

  const person = computed(() => me.value?.account ?? null)
  const role = computed(() => me.value?.role ?? null)
  const firms = computed(() => me.value?.firms ?? [])
  const firmName = computed(() => me.value?.firm?.name ?? 'Torfolio')
  const timeZone = computed(() => me.value?.firm?.timeZone ?? 'UTC')
  const needsFirmChoice = computed(() => me.value !== null && me.value.firm === null)

  /** What the signed-in person may do in the firm, apart from any calculation. */
  const allows = (action: Action): Permission =>
    role.value
      ? may(action, { role: role.value, parts: [] })
      : { allowed: false, reason: 'You are not signed in.' }

  return {
    me,
    isDemo,
    needsFirstFirm,
    failure,
    hasLapsed,
    person,
    role,
    firms,
    firmName,
    timeZone,
    needsFirmChoice,
    know,
    begin,
    end,
    allows,
  }
})
