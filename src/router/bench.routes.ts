import type { RouteRecordRaw } from 'vue-router'

export const benchRoutes: RouteRecordRaw[] = [
  { path: '/bench', name: 'bench', component: () => import('../views/bench/BenchView.vue'), meta: { title: 'bench.title', permission: 'pack.read' } },
]
