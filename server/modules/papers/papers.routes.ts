import type { YearlyCylinderRow } from '../../../shared/api/cylinders'
import { isAfter } from '../../../shared/dates/plain-date'
import type { Actor } from '../../actor'
import type { Tx } from '../../database'
import type { House } from '../../house'
import { say } from '../../language'
import { cylinderLedgerCells } from '../../papers/cylinder-ledger'
import { entryCells, type EntryRow } from '../../papers/entries'
import { leakRateSummary, type Making } from '../../papers/leak-rate-summary'
import { serviceRecord } from '../../papers/service-record'
import { badField } from '../../problem'
import { route, type Route } from '../../route'
import { rowsByCursor } from './cursor'
import entriesSql from './entries.sql?raw'
import { LeakRateSummaryQuery, PeriodQuery, ServiceRecordQuery, YearQuery } from './papers.dto'
import { companyName } from './places.repository'
import { recordOf } from './record.service'
import { fileNameOf, sendCsv, sendPdf } from './send'
import { summaryOf } from './summary.service'
import yearlyCylindersSql from './yearly-cylinders.sql?raw'

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
    handle: ({ who, query: { year }, response }) => house.database.inCompany(who, (tx) => {
      const rows = rowsByCursor<YearlyCylinderRow>(tx, yearlyCylindersSql, [who.companyId, `${year}-01-01`, `${year}-12-31`])
      return sendCsv(response, cylinderLedgerCells(rows, who.locale), fileNameOf([nameOf(who, 'cylinders'), String(year)], 'csv'))
    }),
  }),
  route({
    method: 'get', path: '/api/papers/entries.csv', may: 'export.read', summary: 'Every entry of the ledger, as CSV', query: PeriodQuery, perMinute: EXPORTS_PER_MINUTE,
    handle: ({ who, query: { from, to }, response }) => {
      if (from && to && isAfter(from, to)) throw badField('to', 'dateOrder')
      return house.database.inCompany(who, (tx) => {
        const rows = rowsByCursor<EntryRow>(tx, entriesSql, [who.companyId, from ?? null, to ?? null], { asArrays: true })
        return sendCsv(response, entryCells(rows, who.locale), fileNameOf([nameOf(who, 'entries'), from ?? '', to ?? ''], 'csv'))
      })
    },
  }),
]

const nameOf = (who: Actor, paper: 'summary' | 'record' | 'cylinders' | 'entries'): string => say(who.locale, `papers.fileName.${paper}`)

const makingOf = async (tx: Tx, who: Actor, madeAt: Date): Promise<Making> =>
  ({ locale: who.locale, personName: who.name, companyName: await companyName(tx, who.companyId), madeAt })
