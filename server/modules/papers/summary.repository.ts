import type { Tx } from '../../database'
import { RATE_COLUMNS, type RateRow } from './wire'

/** What is asked of one company's circuits in a period. */
export interface PeriodOfCircuits {
  companyId: string
  circuitIds: string[]
  from: string
  to: string
}
const parametersOf = ({ companyId, circuitIds, from, to }: PeriodOfCircuits): unknown[] => [companyId, circuitIds, from, to]

export type AdditionRow = RateRow & { circuit_id: string; occurred_on: string; mass_kg: string; person_name: string }

export const additionRows = async (tx: Tx, period: PeriodOfCircuits): Promise<AdditionRow[]> =>
  await tx.query(
    `select r.circuit_id, r.occurred_on, r.mass_kg::text, ${RATE_COLUMNS}, person.name as person_name
       from addition_rate r
       join posting p on p.company_id = r.company_id and p.id = r.posting_id
       join person on person.company_id = p.company_id and person.id = p.person_id
      where r.company_id = $1 and r.circuit_id = any ($2::uuid[]) and r.occurred_on between $3 and $4
      order by r.circuit_id, r.position`, parametersOf(period)) as AdditionRow[]

export interface RemovalRow { circuit_id: string; kind: 'recovery' | 'loss'; occurred_on: string; mass_kg: string; purpose: string | null; person_name: string }

export const removalRows = async (tx: Tx, period: PeriodOfCircuits): Promise<RemovalRow[]> =>
  await tx.query(
    `select p.circuit_id, p.kind, p.occurred_on, p.mass_kg::text, p.purpose, person.name as person_name
       from posting p join person on person.company_id = p.company_id and person.id = p.person_id
      where p.company_id = $1 and p.circuit_id = any ($2::uuid[]) and p.occurred_on between $3 and $4 and p.kind in ('recovery', 'loss')
        and not exists (select from posting r where r.company_id = p.company_id and r.reverses_id = p.id)
      order by p.occurred_at, p.id`, parametersOf(period)) as RemovalRow[]

export interface TestRow { circuit_id: string; kind: 'initial' | 'follow-up'; tested_on: string; type: string; passed: boolean; person_name: string }

export const testRows = async (tx: Tx, period: PeriodOfCircuits): Promise<TestRow[]> =>
  await tx.query(
    `select v.circuit_id, v.kind, v.tested_on, v.type, v.passed, person.name as person_name
       from verification v join person on person.company_id = v.company_id and person.id = v.person_id
      where v.company_id = $1 and v.circuit_id = any ($2::uuid[]) and v.tested_on between $3 and $4
      order by v.tested_on, v.recorded_at`, parametersOf(period)) as TestRow[]

/** How many entries of the period were taken back, by circuit. */
export const reversedCounts = async (tx: Tx, period: PeriodOfCircuits): Promise<{ circuit_id: string; count: number }[]> =>
  await tx.query(
    `select p.circuit_id, count(*)::int as count
       from posting p
      where p.company_id = $1 and p.circuit_id = any ($2::uuid[]) and p.occurred_on between $3 and $4
        and exists (select from posting r where r.company_id = p.company_id and r.reverses_id = p.id)
      group by p.circuit_id`, parametersOf(period)) as { circuit_id: string; count: number }[]
