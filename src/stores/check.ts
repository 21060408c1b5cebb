import { defineStore } from 'pinia'
import * as api from '../api/check.api'

export type { TrailFilter } from '../api/check.api'

/** The check of the ledger, and the trail of what else was changed. */
export const useCheckStore = defineStore('check', () => ({
  run: api.checkLedger,
  listTrail: api.listTrail,
}))
