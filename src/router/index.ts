import { createRouter, createWebHistory } from 'vue-router'
import { announceArrival } from './arrival'
import { admit } from './admission'
import { routes } from './routes'

export const makeRouter = () => {
  const router = createRouter({
    history: createWebHistory(),
    routes,
    scrollBehavior: (to, from, saved) => {
      if (saved) return saved
      if (to.hash) return { el: to.hash }
      return to.path === from.path ? false : { top: 0 }
    },
  })
  router.beforeEach(admit)
  router.afterEach(announceArrival)
  return router
}
