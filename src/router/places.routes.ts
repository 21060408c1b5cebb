import type { RouteRecordRaw } from 'vue-router'

export const placesRoutes: RouteRecordRaw[] = [
  { path: '/customers', name: 'customers', component: () => import('../views/customers/CustomersView.vue'), meta: { title: 'customer.list.title', permission: 'customer.read' } },
  { path: '/customers/:id', name: 'customer', component: () => import('../views/customers/CustomerView.vue'), props: true, meta: { title: 'customer.list.title', permission: 'customer.read' } },
  { path: '/sites', name: 'sites', component: () => import('../views/sites/SitesView.vue'), meta: { title: 'site.list.title', permission: 'site.read' } },
  { path: '/sites/new', name: 'site-new', component: () => import('../views/sites/SiteNewView.vue'), meta: { title: 'site.add', permission: 'site.update' } },
  { path: '/sites/:id', name: 'site', component: () => import('../views/sites/SiteView.vue'), props: true, meta: { title: 'site.one', permission: 'site.read' } },
  { path: '/systems/:id', name: 'system', component: () => import('../views/systems/SystemView.vue'), props: true, meta: { title: 'system.one', permission: 'system.read' } },
]
