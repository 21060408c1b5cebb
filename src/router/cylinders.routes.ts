import type { RouteRecordRaw } from 'vue-router'

export const cylindersRoutes: RouteRecordRaw[] = []
