import { createHash } from 'node:crypto'

export const GENESIS = Buffer.alloc(32) // before the first seal there is nothing to cover

/** SQL of what a seal covers of posting `p`: every column of it and of its entries in order, as one text. */
export const SEALED_COLUMNS = `
  jsonb_build_array(p.id, p.kind, p.occurred_on, extract(epoch from p.occurred_at)::text, extract(epoch from p.recorded_at)::text, p.person_id, p.refrigerant,
    p.mass_kg::text, p.entered, p.cylinder_id, p.to_cylinder_id, p.circuit_id, p.partner_id, p.site_id, p.customer_id, p.visit_id, p.leak_id,
    p.purpose, p.is_complete, p.part, p.work_done, p.note, p.reverses_id, p.reason, encode(p.content_hash, 'hex'),
    (select jsonb_agg(jsonb_build_array(e.line, e.account_id, e.refrigerant, e.mass_kg::text, e.customer_id) order by e.line)
       from entry e where e.company_id = p.company_id and e.posting_id = p.id))::text`

/** The hash of a block: over the seal before it, its number, and each posting in order. SHA-256. */
export class SealHash {
  private readonly hash = createHash('sha256')
  constructor(previous: Buffer, number: number) {
    this.hash.update(previous).update(`\n${number}\n`)
  }
  add(content: string): void {
    this.hash.update(content).update('\n')
  }
  digest(): Buffer {
    return this.hash.digest()
  }
}
