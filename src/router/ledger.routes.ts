import type { RouteRecordRaw } from 'vue-router'

export const ledgerRoutes: RouteRecordRaw[] = [
  {
    path: '/postings', name: 'postings', component: () => import('../views/postings/PostingsView.vue'),
    meta: { title: 'posting.list.title', permission: 'posting.read' },
  },
  {
    path: '/postings/new', name: 'posting-new', component: () => import('../views/postings/PostingNewView.vue'),
    meta: { title: 'posting.form.title', permission: 'posting.create' },
  },
  {
    path: '/postings/:id', name: 'posting', component: () => import('../views/postings/PostingView.vue'), props: true,
    meta: { title: 'posting.list.title', permission: 'posting.read' },
  },
]
