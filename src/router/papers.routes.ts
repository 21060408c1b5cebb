import type { RouteRecordRaw } from 'vue-router'

export const papersRoutes: RouteRecordRaw[] = [
  { path: '/papers', name: 'papers', component: () => import('../views/papers/PapersView.vue'), meta: { title: 'paper.title', permission: 'paper.read' } },
  { path: '/check', name: 'check', component: () => import('../views/check/CheckView.vue'), meta: { title: 'check.title', permission: 'ledger.check' } },
  { path: '/packs', name: 'packs', component: () => import('../views/packs/PacksView.vue'), meta: { title: 'pack.title', permission: 'pack.read' } },
]
