import type { RouteRecordRaw } from 'vue-router'

export const circuitsRoutes: RouteRecordRaw[] = [
  {
    path: '/circuits', name: 'circuits', component: () => import('../views/circuits/CircuitsView.vue'),
    meta: { title: 'circuit.list.title', permission: 'circuit.read' },
  },
  {
    path: '/circuits/:id', name: 'circuit', component: () => import('../views/circuits/CircuitView.vue'), props: true,
    meta: { title: 'circuit.list.circuit', permission: 'circuit.read' },
  },
  {
    path: '/circuits/:id/weigh', name: 'weigh-in', component: () => import('../views/weigh-in/WeighInView.vue'), props: true,
    meta: { title: 'weighIn.title', permission: 'posting.create' },
  },
]
