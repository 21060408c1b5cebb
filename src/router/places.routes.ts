import type { RouteRecordRaw } from 'vue-router'

export const placesRoutes: RouteRecordRaw[] = []
