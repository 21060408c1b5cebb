import type { RouteRecordRaw } from 'vue-router'

export const papersRoutes: RouteRecordRaw[] = []
