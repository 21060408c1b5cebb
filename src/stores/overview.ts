import { shallowRef } from 'vue'
import { defineStore } from 'pinia'
import type { WireOverview } from '../../shared/api/places'
import { listCircuits } from '../api/circuits.api'
import { getOverview } from '../api/overview.api'
import { toProblem, type Problem } from '../api/problem'

/** How all circuits stand, the worst first. */
export const useOverviewStore = defineStore('overview', () => {
  const overview = shallowRef<WireOverview | null>(null)
  const problem = shallowRef<Problem | null>(null)

  async function load(): Promise<void> {
    problem.value = null
    try {
      overview.value = await getOverview()
    } catch (thrown) {
      problem.value = toProblem(thrown)
    }
  }

  return { overview, problem, load, listCircuits }
})
