import { defineStore } from 'pinia'
import * as api from '../api/people.api'

export type { PersonFilter } from '../api/people.api'

/** People of the company and their invitations. */
export const usePeopleStore = defineStore('people', () => ({
  list: api.listPeople,
  get: api.getPerson,
  invite: api.invitePerson,
  inviteAgain: api.inviteAgain,
  change: api.changePerson,
  disable: api.disablePerson,
  enable: api.enablePerson,
}))
