import type { House } from '../house'
import { sealCompany } from '../modules/ledger/seal.service'

/** Seals what was posted since the last run, company by company, until nothing waits. */
export async function sealPostings(house: House): Promise<void> {
  const companies = await house.database.query<{ all_companies: string }>('select all_companies()')
  for (const { all_companies: companyId } of companies) {
    let sealed = 0
    do sealed = await house.database.inCompany({ companyId, customerIds: null }, (tx) => sealCompany(tx, companyId))
    while (sealed > 0)
  }
}
