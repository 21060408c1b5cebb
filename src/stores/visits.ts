import { defineStore } from 'pinia'
import type { PlainDate } from '../../shared/dates/plain-date'
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

  /** The sites where the person at the screen was last, the latest first. */
  async function mySites(most: number): Promise<{ siteId: string; siteName: string; visitedOn: PlainDate }[]> {
    const session = useSessionStore()
    const { rows } = await api.listVisits({ search: session.me?.name, limit: 60 })
    const bySite = new Map<string, (typeof rows)[number]>()
    for (const visit of rows) {
      if (visit.personId === session.me?.id && !bySite.has(visit.siteId)) bySite.set(visit.siteId, visit)
    }
    return [...bySite.values()].slice(0, most)
  }

  return { mine, mySites, list: api.listVisits, create: api.createVisit, attach: api.attachCalculation }
})
