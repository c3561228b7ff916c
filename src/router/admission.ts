import type { RouteLocationNormalized } from 'vue-router'
import { useSessionStore } from '@/stores/session'

/**
 * Who may open a page: anybody the open ones, the signed-in the rest. While the installation has no firm
 * yet, every way leads to the page that makes the first one; with several firms and none chosen, to the
 * choice. The server decides again on every request.
 */
export const admit = async (to: RouteLocationNormalized) => {
  const session = useSessionStore()
  await session.know()
  if (session.failure) return true
  if (session.needsFirstFirm) return to.name === 'welcome' || { name: 'welcome', hash: to.hash }
  if (to.name === 'welcome') return { name: 'in-tray' }
  if (!session.person) return to.meta.open || { name: 'sign-in', query: wayBack(to.fullPath) }
  if (to.name === 'sign-in') return { name: 'in-tray' }
  if (session.needsFirmChoice && !to.meta.open && to.name !== 'choose-firm')
    return { name: 'choose-firm', query: wayBack(to.fullPath) }
  return true
}

/** Where to go on after signing in; nothing for the in-tray, where one goes anyway. */
export const wayBack = (fullPath: string): { next?: string } => (fullPath === '/' ? {} : { next: fullPath })

/** Only places of ours: an address of another site in `next` leads to the in-tray. */
export const placeAfter = (next: unknown): string =>
  typeof next === 'string' && /^\/(?![/\\])/.test(next) ? next : '/'
