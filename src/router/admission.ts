import type { RouteLocationNormalized } from 'vue-router'
import { useSessionStore } from '@/stores/session'

/**
 * Who may open a page: anybody the open ones, the signed-in the rest. While the installation has no firm
 * yet, every way leads to the page that makes the first one. The server decides again on every request.
 */
export const admit = async (to: RouteLocationNormalized) => {
  const session = useSessionStore()
  await session.know()
  if (session.needsFirstFirm) return to.name === 'welcome' || { name: 'welcome' }
  if (to.name === 'welcome') return { name: 'in-tray' }
  if (session.person) return to.name === 'sign-in' ? { name: 'in-tray' } : true
  if (to.meta.open) return true
  return { name: 'sign-in', query: to.fullPath === '/' ? {} : { next: to.fullPath } }
}
