import type { RouteRecordRaw } from 'vue-router'

export const circuitsRoutes: RouteRecordRaw[] = []
