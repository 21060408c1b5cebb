import type { RouteRecordRaw } from 'vue-router'

export const accountRoutes: RouteRecordRaw[] = [
  { path: '/sign-in', name: 'sign-in', component: () => import('../views/account/SignInView.vue'), meta: { title: 'shell.titles.signIn', isOpen: true } },
  { path: '/forgot', name: 'forgot', component: () => import('../views/account/ForgotView.vue'), meta: { title: 'shell.titles.forgot', isOpen: true } },
  { path: '/reset/:token', name: 'reset', component: () => import('../views/account/ResetView.vue'), props: true, meta: { title: 'shell.titles.reset', isOpen: true } },
  { path: '/invitation/:token', name: 'invitation', component: () => import('../views/account/InvitationView.vue'), props: true, meta: { title: 'shell.titles.invitation', isOpen: true } },
  { path: '/account', name: 'account', component: () => import('../views/account/AccountView.vue'), meta: { title: 'shell.titles.account', permission: 'account.own' } },
  { path: '/mail', name: 'mail', component: () => import('../views/account/MailView.vue'), meta: { title: 'shell.titles.mail', isOpen: true } },
  { path: '/not-allowed', name: 'not-allowed', component: () => import('../views/account/NotAllowedView.vue'), meta: { title: 'shell.titles.notAllowed' } },
  { path: '/:path(.*)*', name: 'not-found', component: () => import('../views/account/NotFoundView.vue'), meta: { title: 'shell.titles.notFound' } },
]
