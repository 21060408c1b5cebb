import { defineStore } from 'pinia'
import * as api from '../api/visits.api'
import { useSessionStore } from './session'

/** Calls at sites. */
export const useVisitsStore = defineStore('visits', () => {
  /** The visit of the person at the screen at a site on a day, if one was begun. */
  async function mine(siteId: string, visitedOn: string): Promise<string | null> {
    const session = useSessionStore()
    const { rows } = await api.listVisits({ siteId, limit: 20 })
    return rows.find((visit) => visit.personId === session.me?.id && visit.visitedOn === visitedOn)?.id ?? null
  }
  return { mine, list: api.listVisits, create: api.createVisit }
})
