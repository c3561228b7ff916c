import { nextTick } from 'vue'
import type { RouteLocationNormalized } from 'vue-router'

/** The window's title: what the page is, then the program's name. */
export const setPageTitle = (title: string): void => {
  document.title = `${title} – Torfolio`
}

/**
 * Names the page in the window's title and moves the focus to its heading, so that a screen reader says
 * where one has arrived and Tab goes on from there. The first page keeps the browser's own focus.
 */
export const announceArrival = async (to: RouteLocationNormalized, from: RouteLocationNormalized) => {
  setPageTitle(to.meta.title)
  if (from.matched.length === 0 || to.path === from.path) return
  await nextTick()
  const heading = document.querySelector<HTMLElement>('#content h1')
  if (heading && !heading.hasAttribute('tabindex')) heading.tabIndex = -1
  ;(heading ?? document.getElementById('content'))?.focus({ preventScroll: true })
}
