import { Answer, route, type Route } from '../../route'
import type { House } from '../../house'
import { Problem } from '../../problem'
import { IdParams } from '../../fields'
import { checkLedger } from './check.service'
import { PostingDraftDto, PostingsQuery } from './ledger.dto'
import * as ledger from './ledger.service'

const CREATED = 201
const POSTINGS_PER_MINUTE = 20_000 // a phone that was away sends all it has at once
const OK = 200

export const ledgerRoutes = (house: House): Route[] => [
  route({
    method: 'post', path: '/api/postings', may: 'posting.create', summary: 'Post a weighing once; a repeat gets the first answer', body: PostingDraftDto, perMinute: POSTINGS_PER_MINUTE,
    problems: ['posting-id-reused', 'idempotency-key-missing', 'wrong-refrigerant', 'fill-limit-exceeded', 'test-date-passed', 'cylinder-negative'],
    handle: async ({ who, body, request }) => {
      const key = request.get('idempotency-key')
      if (!key) throw new Problem('idempotency-key-missing')
      if (key.replaceAll('"', '') !== body.id) throw new Problem('posting-id-reused')
      return house.database.inCompany(who, async (tx) => {
        const posted = await ledger.post(tx, who, body, house.now())
        return new Answer(posted.isNew ? CREATED : OK, await ledger.getPosting(tx, who, posted.id))
      })
    },
  }),
  route({
    method: 'get', path: '/api/postings', may: 'posting.read', summary: 'Postings, newest first', query: PostingsQuery,
    handle: ({ who, query }) => house.database.inCompany(who, (tx) => ledger.listPostings(tx, who, query)),
  }),
  route({
    method: 'get', path: '/api/postings/:id', may: 'posting.read', summary: 'One posting with its entries', params: IdParams, problems: ['not-found'],
    handle: ({ who, params }) => house.database.inCompany(who, (tx) => ledger.getPosting(tx, who, params.id)),
  }),
  route({
    method: 'get', path: '/api/ledger/check', may: 'ledger.check', summary: 'Recompute the whole ledger and name every fault', perMinute: 6,
    handle: ({ who }) => house.database.inCompanyAtOneMoment(who, (tx) => checkLedger(tx, who.companyId, house.now())),
  }),
]
