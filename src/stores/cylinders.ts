import { defineStore } from 'pinia'
import * as api from '../api/cylinders.api'

export type { CylinderFilter } from '../api/cylinders.api'

/** Cylinders and what they hold. */
export const useCylindersStore = defineStore('cylinders', () => ({
  list: api.listCylinders,
  get: api.getCylinder,
  create: api.createCylinder,
  change: api.changeCylinder,
}))
