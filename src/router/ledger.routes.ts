import type { RouteRecordRaw } from 'vue-router'

export const ledgerRoutes: RouteRecordRaw[] = []
