import { created, route, type Route } from '../../route'
import type { House } from '../../house'
import { IdParams } from '../../fields'
import { badField } from '../../problem'
import { PeopleQuery, PersonDraftDto } from './people.dto'
import * as people from './people.service'

export const peopleRoutes = (house: House): Route[] => {
  const { database, now } = house
  return [
    route({
      method: 'get', path: '/api/people', may: 'person.read', summary: 'People of the company', query: PeopleQuery,
      handle: ({ who, query }) => database.inCompany(who, (tx) => people.listPeople(tx, who, query)),
    }),
    route({
      method: 'post', path: '/api/people', may: 'person.manage', summary: 'Add a person and mail the invitation', body: PersonDraftDto, problems: ['email-taken'], perMinute: 60,
      handle: async ({ who, body }) => {
        const person = await database.inCompany(who, (tx) => people.createPerson(tx, who, body))
        return created({ ...person, mailSent: await people.invite(house, who, person) })
      },
    }),
    route({
      method: 'get', path: '/api/people/:id', may: 'person.read', summary: 'One person', params: IdParams, problems: ['not-found'],
      handle: ({ who, params }) => database.inCompany(who, (tx) => people.getPerson(tx, who, params.id)),
    }),
    route({
      method: 'patch', path: '/api/people/:id', may: 'person.manage', summary: 'Change a person', params: IdParams, body: PersonDraftDto, needsVersion: true,
      problems: ['not-found', 'changed-meanwhile', 'version-missing', 'email-taken'],
      handle: ({ who, params, body, version }) => database.inCompany(who, (tx) => people.changePerson(tx, who, params.id, version, body, now())),
    }),
    route({
      method: 'post', path: '/api/people/:id/invite', may: 'person.manage', summary: 'Mail the invitation again', params: IdParams, problems: ['not-found'], perMinute: 20,
      handle: async ({ who, params }) => {
        const person = await database.inCompany(who, (tx) => people.getPerson(tx, who, params.id))
        if (person.state !== 'invited') throw badField('id', 'notInvited')
        return { ...person, mailSent: await people.invite(house, who, person) }
      },
    }),
    route({
      method: 'post', path: '/api/people/:id/disable', may: 'person.manage', summary: 'Shut an account', params: IdParams, problems: ['not-found'],
      handle: ({ who, params }) => database.inCompany(who, (tx) => people.setDisabled(tx, who, params.id, true, now())),
    }),
    route({
      method: 'post', path: '/api/people/:id/enable', may: 'person.manage', summary: 'Open an account again', params: IdParams, problems: ['not-found'],
      handle: ({ who, params }) => database.inCompany(who, (tx) => people.setDisabled(tx, who, params.id, false, now())),
    }),
  ]
}
