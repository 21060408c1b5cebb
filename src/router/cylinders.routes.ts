import type { RouteRecordRaw } from 'vue-router'

export const cylindersRoutes: RouteRecordRaw[] = [
  { path: '/cylinders', name: 'cylinders', component: () => import('../views/cylinders/CylindersView.vue'), meta: { title: 'cylinder.list.title', permission: 'cylinder.read' } },
  { path: '/cylinders/:id', name: 'cylinder', component: () => import('../views/cylinders/CylinderView.vue'), props: true, meta: { title: 'cylinder.one', permission: 'cylinder.read' } },
  { path: '/partners', name: 'partners', component: () => import('../views/partners/PartnersView.vue'), meta: { title: 'partner.list.title', permission: 'partner.read' } },
]
