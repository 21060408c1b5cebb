import type { RouteRecordRaw } from 'vue-router'

export const overviewRoutes: RouteRecordRaw[] = []
