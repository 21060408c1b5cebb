import { created, route, type Route } from '../../route'
import type { House } from '../../house'
import { IdParams } from '../../fields'
import { PartnerDraftDto, PartnersQuery } from './partners.dto'
import * as partners from './partners.service'

export const partnersRoutes = ({ database }: House): Route[] => [
  route({
    method: 'get', path: '/api/partners', may: 'partner.read', summary: 'Suppliers, reclaimers and destroyers', query: PartnersQuery,
    handle: ({ who, query }) => database.inCompany(who, (tx) => partners.listPartners(tx, who, query)),
  }),
  route({
    method: 'post', path: '/api/partners', may: 'partner.update', summary: 'Add a trade partner', body: PartnerDraftDto, problems: ['name-taken'],
    handle: async ({ who, body }) => created(await database.inCompany(who, (tx) => partners.createPartner(tx, who, body))),
  }),
  route({
    method: 'get', path: '/api/partners/:id', may: 'partner.read', summary: 'One trade partner', params: IdParams, problems: ['not-found'],
    handle: ({ who, params }) => database.inCompany(who, (tx) => partners.getPartner(tx, who, params.id)),
  }),
  route({
    method: 'patch', path: '/api/partners/:id', may: 'partner.update', summary: 'Change a trade partner', params: IdParams, body: PartnerDraftDto, needsVersion: true,
    problems: ['not-found', 'changed-meanwhile', 'version-missing', 'name-taken'],
    handle: ({ who, params, body, version }) => database.inCompany(who, (tx) => partners.changePartner(tx, who, params.id, version, body)),
  }),
]
