import type { Actor } from '../../actor'
import type { House } from '../../house'
import { say } from '../../language'
import { leakRateSummary } from '../../papers/leak-rate-summary'
import { serviceRecord } from '../../papers/service-record'
import { route, type Route } from '../../route'
import { entriesOf, yearlyCylinders } from './exports.service'
import { makingOf } from './making.service'
import { LeakRateSummaryQuery, PeriodQuery, ServiceRecordQuery, YearQuery } from './papers.dto'
import { recordOf } from './record.service'
import { fileNameOf, sendCsv, sendPdf } from './send'
import { summaryOf } from './summary.service'

const PAPERS_PER_MINUTE = 60
const EXPORTS_PER_MINUTE = 20

export const papersRoutes = (house: House): Route[] => [
  route({
    method: 'get', path: '/api/papers/leak-rate-summary.pdf', may: 'paper.read', summary: 'Leak-rate summary of a site for a period, as PDF',
    query: LeakRateSummaryQuery, problems: ['not-found'], perMinute: PAPERS_PER_MINUTE,
    handle: async ({ who, query, response }) => {
      const [summary, making] = await house.database.inCompany(who, async (tx) => [await summaryOf(tx, who, query, house.now()), await makingOf(tx, who, house.now())] as const)
      const { from, to } = summary.period
      return sendPdf(response, leakRateSummary(summary, making), fileNameOf([nameOf(who, 'summary'), summary.site.name, from, to], 'pdf'))
    },
  }),
  route({
    method: 'get', path: '/api/papers/service-record.pdf', may: 'paper.read', summary: 'Service record of a visit or of one posting, as PDF',
    query: ServiceRecordQuery, problems: ['not-found'], perMinute: PAPERS_PER_MINUTE,
    handle: async ({ who, query, response }) => {
      const [record, making] = await house.database.inCompany(who, async (tx) => [await recordOf(tx, who, query), await makingOf(tx, who, house.now())] as const)
      return sendPdf(response, serviceRecord(record, making), fileNameOf([nameOf(who, 'record'), record.site.name, record.servicedOn], 'pdf'))
    },
  }),
  route({
    method: 'get', path: '/api/papers/cylinder-ledger.csv', may: 'export.read', summary: 'Yearly ledger of all cylinders, as CSV', query: YearQuery, perMinute: EXPORTS_PER_MINUTE,
    handle: ({ who, query: { year }, response }) => house.database.inCompany(who, (tx) =>
      sendCsv(response, yearlyCylinders(tx, who, year), fileNameOf([nameOf(who, 'cylinders'), String(year)], 'csv'))),
  }),
  route({
    method: 'get', path: '/api/papers/entries.csv', may: 'export.read', summary: 'Every entry of the ledger, as CSV', query: PeriodQuery, perMinute: EXPORTS_PER_MINUTE,
    handle: ({ who, query, response }) => house.database.inCompany(who, (tx) =>
      sendCsv(response, entriesOf(tx, who, query), fileNameOf([nameOf(who, 'entries'), query.from ?? '', query.to ?? ''], 'csv'))),
  }),
]

const nameOf = (who: Actor, paper: 'summary' | 'record' | 'cylinders' | 'entries'): string => say(who.locale, `papers.fileName.${paper}`)
