import { created, route, type Route } from '../../route'
import type { House } from '../../house'
import { IdParams } from '../../fields'
import { SiteDraftDto, SitesQuery } from './sites.dto'
import * as sites from './sites.service'

export const sitesRoutes = ({ database }: House): Route[] => [
  route({
    method: 'get', path: '/api/sites', may: 'site.read', summary: 'Sites', query: SitesQuery,
    handle: ({ who, query }) => database.inCompany(who, (tx) => sites.listSites(tx, who, query)),
  }),
  route({
    method: 'post', path: '/api/sites', may: 'site.update', summary: 'Add a site', body: SiteDraftDto,
    handle: async ({ who, body }) => created(await database.inCompany(who, (tx) => sites.createSite(tx, who, body))),
  }),
  route({
    method: 'get', path: '/api/sites/:id', may: 'site.read', summary: 'One site', params: IdParams, problems: ['not-found'],
    handle: ({ who, params }) => database.inCompany(who, (tx) => sites.getSite(tx, who, params.id)),
  }),
  route({
    method: 'patch', path: '/api/sites/:id', may: 'site.update', summary: 'Change a site', params: IdParams, body: SiteDraftDto, needsVersion: true,
    problems: ['not-found', 'changed-meanwhile', 'version-missing'],
    handle: ({ who, params, body, version }) => database.inCompany(who, (tx) => sites.changeSite(tx, who, params.id, version, body)),
  }),
]
