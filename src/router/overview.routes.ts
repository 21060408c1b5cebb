import type { RouteRecordRaw } from 'vue-router'

export const overviewRoutes: RouteRecordRaw[] = [
  {
    path: '/overview', name: 'overview', component: () => import('../views/overview/OverviewView.vue'),
    meta: { title: 'overview.title', permission: 'circuit.read' },
  },
  {
    path: '/today', name: 'today', component: () => import('../views/today/TodayView.vue'),
    meta: { title: 'today.title', permission: 'visit.update' },
  },
]
