import type { RouteRecordRaw } from 'vue-router'

export const peopleRoutes: RouteRecordRaw[] = [
  { path: '/people', name: 'people', component: () => import('../views/people/PeopleView.vue'), meta: { title: 'person.list.title', permission: 'person.read' } },
]
