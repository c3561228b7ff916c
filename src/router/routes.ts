import type { RouteRecordRaw } from 'vue-router'

declare module 'vue-router' {
  interface RouteMeta {
    /** What the window's title says before the firm's name of the program. */
    title: string
    /** Open to people who are not signed in. */
    open?: boolean
    /** False where the frame's row with the navigation is left out. */
    frame?: boolean
  }
}

/** Every page of the client; each is loaded when it is first opened. */
export const routes: RouteRecordRaw[] = [
  {
    path: '/',
    name: 'in-tray',
    component: () => import('@/views/InTrayView.vue'),
    meta: { title: 'In-tray' },
  },
  {
    path: '/calculations',
    name: 'calculations',
    component: () => import('@/views/CalculationsView.vue'),
    meta: { title: 'Calculations' },
  },
  {
    path: '/calculations/:id',
    name: 'calculation',
    component: () => import('@/views/SheetView.vue'),
    meta: { title: 'Calculation' },
  },
  {
    path: '/projects',
    name: 'projects',
    component: () => import('@/views/ProjectsView.vue'),
    meta: { title: 'Projects' },
  },
  {
    path: '/templates',
    name: 'templates',
    component: () => import('@/views/TemplatesView.vue'),
    meta: { title: 'Templates' },
  },
  {
    path: '/templates/:name',
    name: 'template',
    component: () => import('@/views/TemplateView.vue'),
    meta: { title: 'Template' },
  },
  {
    path: '/people',
    name: 'people',
    component: () => import('@/views/PeopleView.vue'),
    meta: { title: 'People' },
  },
  { path: '/help', name: 'help', component: () => import('@/views/HelpView.vue'), meta: { title: 'Help' } },
  {
    path: '/sign-in',
    name: 'sign-in',
    component: () => import('@/views/SignInView.vue'),
    meta: { title: 'Sign in', open: true, frame: false },
  },
  {
    path: '/choose-firm',
    name: 'choose-firm',
    component: () => import('@/views/ChooseFirmView.vue'),
    meta: { title: 'Choose a firm', frame: false },
  },
  {
    path: '/welcome',
    name: 'welcome',
    component: () => import('@/views/WelcomeView.vue'),
    meta: { title: 'Welcome', open: true, frame: false },
  },
  {
    // The secret stands after #, where no server sees it.
    path: '/set-password',
    name: 'set-password',
    component: () => import('@/views/SetPasswordView.vue'),
    meta: { title: 'Set your password', open: true, frame: false },
  },
  {
    path: '/:path(.*)*',
    name: 'not-found',
    component: () => import('@/views/NotFoundView.vue'),
    meta: { title: 'No such page' },
  },
]
