import { defineStore } from 'pinia'
import * as api from '../api/sites.api'

export type { SiteFilter } from '../api/sites.api'

/** Sites: where the systems stand. */
export const useSitesStore = defineStore('sites', () => ({
  list: api.listSites,
  get: api.getSite,
  create: api.createSite,
  change: api.changeSite,
}))
