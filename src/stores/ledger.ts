import { defineStore } from 'pinia'
import * as api from '../api/ledger.api'

export type { PostingFilter } from '../api/ledger.api'

/** Postings, and what they are posted against. */
export const useLedgerStore = defineStore('ledger', () => ({
  list: api.listPostings,
  get: api.getPosting,
  post: api.postPosting,
  listCylindersInUse: api.listCylindersInUse,
  getCylinder: api.getCylinderToWeigh,
  listPartners: api.listPartnersToPost,
  serviceRecordAddress: api.serviceRecordAddress,
  entriesAddress: api.entriesAddress,
}))
