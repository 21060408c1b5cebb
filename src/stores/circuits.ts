import { defineStore } from 'pinia'
import * as api from '../api/circuits.api'

export type { CircuitFilter } from '../api/circuits.api'

/** Circuits: their list, one sheet, and what is written on it. */
export const useCircuitsStore = defineStore('circuits', () => ({
  list: api.listCircuits,
  get: api.getCircuit,
  create: api.createCircuit,
  change: api.changeCircuit,
  reviseFullCharge: api.reviseFullCharge,
  addComponent: api.addComponent,
  changeComponent: api.changeComponent,
  addMark: api.addMark,
  resolveMark: api.resolveMark,
  addLeak: api.addLeak,
  repairLeak: api.repairLeak,
  addVerification: api.addVerification,
  leakRateSummaryAddress: api.leakRateSummaryAddress,
}))
