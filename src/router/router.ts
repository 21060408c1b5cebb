import { createRouter, createWebHistory } from 'vue-router'
import { useSessionStore } from '../stores/session'
import './meta'
import { startOf } from './navigation'
import { routes } from './routes'

export const router = createRouter({
  history: createWebHistory(),
  routes,
  scrollBehavior: (to, from, saved) => saved ?? (to.path === from.path ? false : { top: 0 }),
})

router.beforeEach(async (to) => {
  if (to.meta.isOpen) return true
  const session = useSessionStore()
  await session.ensureLoaded()
  // Not known who it is (no line at the start): the app shows the problem in place of the page.
  if (session.state === 'unknown') return true
  if (!session.me) return { name: 'sign-in', query: to.fullPath === '/' ? {} : { to: to.fullPath } }
  if (to.path === '/') return { path: startOf(session.me.role), replace: true }
  if (to.meta.permission && !session.may(to.meta.permission)) return { name: 'not-allowed', replace: true }
  return true
})
