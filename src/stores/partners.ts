import { defineStore } from 'pinia'
import * as api from '../api/partners.api'

export type { PartnerFilter } from '../api/partners.api'

/** Suppliers, reclaimers and destroyers. */
export const usePartnersStore = defineStore('partners', () => ({
  list: api.listPartners,
  get: api.getPartner,
  create: api.createPartner,
  change: api.changePartner,
}))
