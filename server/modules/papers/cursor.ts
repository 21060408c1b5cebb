import type { PoolClient } from 'pg'
import Cursor from 'pg-cursor'
import type { Tx } from '../../database'

const BATCH = 500 // rows in memory at a time

/** The rows of a query, fetched in batches as they are taken, so that memory stays flat however many there are. */
export async function* rowsByCursor<Row>(tx: Tx, sql: string, parameters: unknown[], { asArrays = false } = {}): AsyncGenerator<Row> {
  if (!tx.queryRunner) throw new Error('A cursor needs a transaction.')
  const client = await tx.queryRunner.connect() as PoolClient // what TypeORM's PostgreSQL driver hands out
  const cursor = client.query(new Cursor<Row>(sql, parameters, asArrays ? { rowMode: 'array' } : {}))
  try {
    for (let rows = await cursor.read(BATCH); rows.length > 0; rows = await cursor.read(BATCH)) yield* rows
  } finally {
    await cursor.close()
  }
}
