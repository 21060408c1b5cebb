import { defineStore } from 'pinia'
import * as api from '../api/papers.api'

/** Papers and exports: where each is opened. */
export const usePapersStore = defineStore('papers', () => ({
  leakRateSummaryAddress: api.leakRateSummaryAddress,
  serviceRecordAddress: api.serviceRecordAddress,
  cylinderLedgerAddress: api.cylinderLedgerAddress,
  entriesAddress: api.entriesAddress,
}))
