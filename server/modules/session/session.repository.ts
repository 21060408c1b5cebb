import type { Database, Tx } from '../../database'
import type { Role } from '../../../shared/access/roles'
import { Company } from '../../entities/company'
import { Person } from '../../entities/person'
import { PersonLink } from '../../entities/person-link'
import { PersonSession } from '../../entities/person-session'

export interface ActorRow {
  person_id: string
  name: string
  email: string
  role: Role
  locale: string
  customer_ids: string[]
}

export const findAccount = async (database: Database, email: string): Promise<{ company_id: string; person_id: string } | null> =>
  (await database.query<{ company_id: string; person_id: string }>('select * from find_account($1)', [email]))[0] ?? null

export const findActorRow = async (database: Database, companyId: string, sessionId: string): Promise<ActorRow | null> =>
  (await database.query<ActorRow>('select * from find_actor($1, $2)', [companyId, sessionId]))[0] ?? null

export const personById = (tx: Tx, companyId: string, id: string): Promise<Person | null> => tx.findOneBy(Person, { companyId, id })
export const companyOf = (tx: Tx, companyId: string): Promise<Company> => tx.findOneByOrFail(Company, { id: companyId })
export const customerIdsOf = async (tx: Tx, companyId: string, personId: string): Promise<string[]> =>
  (await tx.query('select customer_id from person_customer where company_id = $1 and person_id = $2 order by customer_id', [companyId, personId]))
    .map((row: { customer_id: string }) => row.customer_id)

export const sessionForUpdate = (tx: Tx, companyId: string, id: string): Promise<PersonSession | null> =>
  tx.findOne(PersonSession, { where: { companyId, id }, lock: { mode: 'pessimistic_write' } })
export const insertSession = async (tx: Tx, session: Partial<PersonSession>): Promise<void> => { await tx.insert(PersonSession, session) }
export const updateSession = async (tx: Tx, companyId: string, id: string, change: Partial<PersonSession>): Promise<void> => {
  await tx.update(PersonSession, { companyId, id }, change)
}
export const endSessionsOf = async (tx: Tx, companyId: string, personId: string, exceptId: string | null, at: Date): Promise<void> => {
  await tx.query(
    'update person_session set ended_at = $4 where company_id = $1 and person_id = $2 and ended_at is null and id is distinct from $3',
    [companyId, personId, exceptId, at],
  )
}
export const openSessionsOf = (tx: Tx, companyId: string, personId: string): Promise<PersonSession[]> =>
  tx.createQueryBuilder(PersonSession, 's')
    .where('s.companyId = :companyId and s.personId = :personId and s.endedAt is null and s.expiresAt > now()', { companyId, personId })
    .orderBy('s.lastUsedAt', 'DESC').limit(100).getMany()

export const insertLink = async (tx: Tx, link: Partial<PersonLink>): Promise<void> => { await tx.insert(PersonLink, link) }
export const linkForUpdate = (tx: Tx, companyId: string, id: string): Promise<PersonLink | null> =>
  tx.findOne(PersonLink, { where: { companyId, id }, lock: { mode: 'pessimistic_write' } })
/** A new password or a new link makes all earlier ones of that person useless. */
export const useUpLinks = async (tx: Tx, companyId: string, personId: string, at: Date): Promise<void> => {
  await tx.query('update person_link set used_at = $3 where company_id = $1 and person_id = $2 and used_at is null', [companyId, personId, at])
}
export const updatePerson = async (tx: Tx, companyId: string, id: string, change: Partial<Omit<Person, 'preferences'>> & { preferences?: object }): Promise<void> => {
  await tx.update(Person, { companyId, id }, change as never)
}
/** What the people of the office see of a person too: whoever has it open there is told that it changed. */
export const updateOpenPerson = async (tx: Tx, companyId: string, id: string, change: Partial<Omit<Person, 'preferences'>>): Promise<void> => {
  await updatePerson(tx, companyId, id, change)
  await tx.query('update person set version = version + 1 where company_id = $1 and id = $2', [companyId, id])
}
