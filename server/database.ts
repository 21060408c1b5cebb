import 'reflect-metadata'
import pg from 'pg'
import { DataSource, type EntityManager } from 'typeorm'
import { entities } from './entities'
import { SnakeCaseColumns } from './naming'
import { migrations } from '../migrations'

const DATE_OID = 1082 // PostgreSQL's type number of `date`
// A date has no zone: as a JavaScript Date it would shift by the server's own.
pg.types.setTypeParser(DATE_OID, (text) => text)

/** Who acts, in which company; `customerIds` is null for the company's own people and a list for an owner. */
export interface Scope {
  companyId: string
  customerIds: string[] | null
}

/** A transaction that sees one company's rows only. */
export type Tx = EntityManager

const POOL_SIZE = 12 // connections per process; PostgreSQL's default is 100 for all

/**
 * Runs a statement that is asked over and over under a name, so that PostgreSQL plans it once per connection:
 * the planning of a statement with a dozen joins takes longer than running it.
 *
 * @param name  stands for this text alone
 */
export async function prepared<Row>(tx: Tx, name: string, text: string, values: unknown[]): Promise<Row[]> {
  if (!tx.queryRunner) throw new Error('A prepared statement needs a transaction.')
  const client = await tx.queryRunner.connect() as pg.PoolClient
  return (await client.query({ name, text, values })).rows as Row[]
}

/** The data source the application uses: signed in as the role that row security binds. */
export function openDatabase(url: string): DataSource {
  return new DataSource({
    type: 'postgres', url, entities, namingStrategy: new SnakeCaseColumns(), synchronize: false, logging: false,
    extra: { max: POOL_SIZE, application_name: 'weighback' },
  })
}

/** The data source that migrates: signed in as the owner of the tables. */
export function openDatabaseAsOwner(url: string): DataSource {
  return new DataSource({
    type: 'postgres', url, entities, namingStrategy: new SnakeCaseColumns(), migrations, migrationsTableName: 'migration',
    migrationsTransactionMode: 'each', synchronize: false, logging: false, extra: { max: 2 },
  })
}

/** One PostgreSQL database and the only door to it. */
export class Database {
  constructor(readonly source: DataSource) {}

  /**
   * Runs work in one transaction in which row security shows this company alone, and for an owner
   * only the customers the account is tied to. The settings end with the transaction.
   */
  inCompany<T>(scope: Scope, work: (tx: Tx) => Promise<T>): Promise<T> {
    return this.scoped('READ COMMITTED', scope, work)
  }

  /** As `inCompany`, with everything seen as it was at one moment, however many statements read it. */
  inCompanyAtOneMoment<T>(scope: Scope, work: (tx: Tx) => Promise<T>): Promise<T> {
    return this.scoped('REPEATABLE READ', scope, work)
  }

  private scoped<T>(isolation: 'READ COMMITTED' | 'REPEATABLE READ', scope: Scope, work: (tx: Tx) => Promise<T>): Promise<T> {
    return this.source.transaction(isolation, async (tx) => {
      await prepared(tx, 'scope', `select set_config('app.company_id', $1, true), set_config('app.customer_ids', $2, true)`, [
        scope.companyId,
        scope.customerIds === null ? '' : `{${scope.customerIds.join(',')}}`,
      ])
      return work(tx)
    })
  }

  /** Work outside any company: sign-in by address and the like, through functions made for it. */
  query<Row>(sql: string, parameters: unknown[] = []): Promise<Row[]> {
    return this.source.query(sql, parameters)
  }
}
