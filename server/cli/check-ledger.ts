import { readConfig } from '../config'
import { checkLedger } from '../modules/ledger/check.service'
import { closeHouse, openHouse } from '../start'

const house = await openHouse(readConfig(process.env))
try {
  const companies = await house.database.query<{ all_companies: string }>('select all_companies()')
  for (const { all_companies: companyId } of companies) {
    const result = await house.database.inCompanyAtOneMoment({ companyId, customerIds: null }, (tx) => checkLedger(tx, companyId, house.now()))
    console.log(`${companyId}: ${result.postings} postings, ${result.seals} seals, ${result.waiting} waiting, ${result.faults.length} faults`)
    for (const fault of result.faults) console.log(`  ${fault.code} ${fault.postingId ?? fault.accountId ?? `seal ${fault.sealNumber}`}: ${fault.detail}`)
    if (result.faults.length > 0) process.exitCode = 1
  }
} finally {
  await closeHouse(house)
}
