import { created, route, type Route } from '../../route'
import type { House } from '../../house'
import { IdParams, ListDto } from '../../fields'
import { CustomerDraftDto } from './customers.dto'
import * as customers from './customers.service'

export const customersRoutes = ({ database }: House): Route[] => [
  route({
    method: 'get', path: '/api/customers', may: 'customer.read', summary: 'Customers', query: ListDto,
    handle: ({ who, query }) => database.inCompany(who, (tx) => customers.listCustomers(tx, who, query)),
  }),
  route({
    method: 'post', path: '/api/customers', may: 'customer.update', summary: 'Add a customer', body: CustomerDraftDto, problems: ['name-taken'],
    handle: async ({ who, body }) => created(await database.inCompany(who, (tx) => customers.createCustomer(tx, who, body))),
  }),
  route({
    method: 'get', path: '/api/customers/:id', may: 'customer.read', summary: 'One customer', params: IdParams, problems: ['not-found'],
    handle: ({ who, params }) => database.inCompany(who, (tx) => customers.getCustomer(tx, who, params.id)),
  }),
  route({
    method: 'patch', path: '/api/customers/:id', may: 'customer.update', summary: 'Change a customer', params: IdParams, body: CustomerDraftDto, needsVersion: true,
    problems: ['not-found', 'changed-meanwhile', 'version-missing', 'name-taken'],
    handle: ({ who, params, body, version }) => database.inCompany(who, (tx) => customers.changeCustomer(tx, who, params.id, version, body)),
  }),
]
