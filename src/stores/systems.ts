import { defineStore } from 'pinia'
import * as api from '../api/systems.api'

/** Systems: the units of a site. */
export const useSystemsStore = defineStore('systems', () => ({
  list: api.listSystems,
  get: api.getSystem,
  create: api.createSystem,
  change: api.changeSystem,
}))
