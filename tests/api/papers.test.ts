import { parse } from 'csv-parse/sync'
import { v7 as uuid } from 'uuid'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { PostingDraft } from '../../shared/api/ledger'
import { REFRIGERANTS } from '../../shared/refrigerants/catalogue'
import { textCell } from '../../server/papers/csv'
import { Sheet } from '../../server/papers/kit/sheet'
import { aSite } from '../support/builders'
import { aDraft } from '../support/drafts'
import { asBuffer, pdfInfo, pdfText } from '../support/paper-text'
import { aCircuitRow, aCylinderRow, aPartnerRow, aWorld, type World } from '../support/rows'
import { aCompany, aServer, type Client, type TestServer } from '../support/server'

let server: TestServer
beforeAll(async () => { server = await aServer() })
afterAll(async () => { await server.close() })

const sql = (companyId: string, text: string, parameters: unknown[]): Promise<unknown> =>
  server.house.database.inCompany({ companyId, customerIds: null }, (tx) => tx.query(text, parameters))
const post = async (client: Client, given: Parameters<typeof aDraft>[0]): Promise<PostingDraft> => {
  const draft = aDraft(given)
  await client.post('/api/postings', draft).set('Idempotency-Key', draft.id).expect(201)
  return draft
}
const pdfOf = async (client: Client, path: string): Promise<{ text: string; bytes: Buffer; headers: Record<string, string> }> => {
  const { body, headers } = await asBuffer(client.get(path).expect(200))
  const text = pdfText(body)
  expect(text).not.toMatch(/\b(papers|rules)\.[a-z]/) // a key whose sentence is missing
  return { text, bytes: body, headers: headers as Record<string, string> }
}

/** A circuit of 100 lb R-22, filled from a cylinder of 40 lb. */
async function aServicedSite(site: Parameters<typeof aWorld>[2] = {}) {
  const company = await aCompany(server)
  const world = await aWorld(server, company.id, site)
  const supplierId = await aPartnerRow(server, company.id)
  const cylinderId = await aCylinderRow(server, company.id)
  const circuitId = await aCircuitRow(server, world, { pounds: '100' })
  await post(company.officer, { kind: 'purchase', pounds: '40', cylinderId, partnerId: supplierId, on: '2026-01-05' })
  await post(company.officer, { kind: 'opening-charge', pounds: '100', circuitId, on: '2026-01-05' })
  const charge = (given: Partial<Parameters<typeof aDraft>[0]>): Promise<PostingDraft> => post(company.technician, { kind: 'charge', cylinderId, circuitId, purpose: 'leak', ...given })
  return { ...company, world, cylinderId, cylinderNumber: `C-${cylinderId.slice(-8)}`, circuitId, charge }
}

async function aVisit(companyId: string, world: World, personId: string, visitedOn: string): Promise<string> {
  const id = uuid()
  await sql(companyId, `insert into visit (company_id, id, customer_id, site_id, person_id, visited_on, remark) values ($1, $2, $3, $4, $5, $6, 'Alarm on the first stage')`,
    [companyId, id, world.customerId, world.siteId, personId, visitedOn])
  return id
}

const CAUTION = 'Local regulation and licensed practice decide.'
const RESPONSIBLE = 'The owner or operator of the appliance is responsible'

describe('the leak-rate summary of a site', () => {
  it('shows each addition with its rate, threshold, source and caution', async () => {
    const { officer, charge, world } = await aServicedSite()
    await charge({ pounds: '5', on: '2026-02-01' })
    await charge({ pounds: '10', on: '2026-05-02' })
    const { text, bytes, headers } = await pdfOf(officer, `/api/papers/leak-rate-summary.pdf?siteId=${world.siteId}&from=2026-01-01&to=2026-11-30`)
    // worked by hand: 10 of 100 lb, 90 days after the last addition: 10/100 × 365/90 = 40.5556 %
    expect(text).toContain('May 2, 2026 Test technician 10.00 10.00 10.00 90 100.00 40.56 10 Above')
    // no earlier addition: days from commissioning in 2020, at most 365: 5 %
    expect(text).toContain('Feb 1, 2026 Test technician 5.00 5.00 5.00 365 100.00 5.00 10 Not above a')
    expect(text).toContain('a No earlier addition on record: days count from the commissioning date. Our reading where the text is silent.')
    expect(text).toContain('100.00 lb (45.36 kg)')
    expect(text).toContain("Manufacturer's figure")
    for (const sentence of ['above 10 %', '40 CFR 82.157(c)(2)', CAUTION, RESPONSIBLE, 'Page 1 of ', 'by Test officer for Test company', 'Annualizing method']) expect(text).toContain(sentence)
    expect(headers).toMatchObject({ 'content-type': 'application/pdf', 'x-content-type-options': 'nosniff', 'content-disposition': 'attachment; filename="leak-rate-summary_test-site_2026-01-01_2026-11-30.pdf"' })
    const info = pdfInfo(bytes)
    expect(info).toMatch(/Title: +Leak-rate summary – Test site/)
    expect(info).toMatch(/Tagged: +yes/)
    expect(info).toMatch(/JavaScript: +no/)
    expect(info).toMatch(/612 x 792 pts \(letter\)/)
    expect(bytes.toString('latin1')).toMatch(/\/Lang \(en\)/)
    expect(bytes.toString('latin1')).toMatch(/\/DisplayDocTitle true/)
  })

  it('leaves out what was taken back, and says so', async () => {
    const { officer, charge, world } = await aServicedSite()
    const wrong = await charge({ pounds: '7.77', on: '2026-03-01' })
    await post(officer, { kind: 'reversal', reversesId: wrong.id, reason: 'Wrong circuit', on: '2026-03-02' })
    const { text } = await pdfOf(officer, `/api/papers/leak-rate-summary.pdf?siteId=${world.siteId}&from=2026-01-01&to=2026-11-30`)
    expect(text).not.toContain('7.77')
    expect(text).toContain('Nothing was added in the period.')
    expect(text).toContain('One entry of the period was taken back by a reversal and is left out above')
  })

  it('shows what was recovered, and leaves out what lies outside the period', async () => {
    const { officer, technician, charge, world, circuitId } = await aServicedSite()
    const recoveryId = await aCylinderRow(server, world.companyId, { kind: 'recovery', contents: 'recovered' })
    await post(technician, { kind: 'recovery', pounds: '12.34', circuitId, cylinderId: recoveryId, purpose: 'repair', isComplete: false, on: '2026-06-01' })
    await charge({ pounds: '8.88', on: '2026-08-01' })
    const { text } = await pdfOf(officer, `/api/papers/leak-rate-summary.pdf?siteId=${world.siteId}&from=2026-06-01&to=2026-07-31`)
    expect(text).toContain('Jun 1, 2026 Test technician Recovered 12.34 Repair')
    expect(text).not.toContain('8.88')
  })

  it('comes in kilograms on A4 where the site is not in the United States', async () => {
    const { officer, charge, world, id } = await aServicedSite()
    await sql(id, `update site set country = 'DE', jurisdiction = 'EU', time_zone = 'Europe/Berlin' where id = $1`, [world.siteId])
    await charge({ pounds: '10', on: '2026-05-02' })
    const { text, bytes } = await pdfOf(officer, `/api/papers/leak-rate-summary.pdf?siteId=${world.siteId}&from=2026-01-01&to=2026-11-30`)
    expect(pdfInfo(bytes)).toMatch(/595\.28 x 841\.89 pts \(A4\)/)
    expect(text).toContain('45.36 kg (100.00 lb)')
    expect(text).toContain('May 2, 2026 Test technician 4.54 4.54')
  })

  it('is open to the owner of that site; of other customers and companies it looks as if it were not there', async () => {
    const { owner, id, world } = await aServicedSite()
    const foreign = await aServicedSite()
    const otherCustomer = await aWorld(server, id)
    const person = await owner(world.customerId)
    await asBuffer(person.get(`/api/papers/leak-rate-summary.pdf?siteId=${world.siteId}`).expect(200))
    const answers = [otherCustomer.siteId, foreign.world.siteId, uuid()].map((siteId) => person.get(`/api/papers/leak-rate-summary.pdf?siteId=${siteId}`).expect(404))
    const bodies = (await Promise.all(answers)).map(({ body, headers }) => ({ ...body, instance: '', type: headers['content-type'] }))
    expect(bodies[0]).toEqual(bodies[2])
    expect(bodies[1]).toEqual(bodies[2])
  })

  it('refuses a period that ends before it begins', async () => {
    const { officer, world } = await aServicedSite()
    const { body } = await officer.get(`/api/papers/leak-rate-summary.pdf?siteId=${world.siteId}&from=2026-02-01&to=2026-01-01`).expect(422)
    expect(body.errors).toEqual([{ field: 'to', message: 'The end lies before the beginning.' }])
  })
})

describe('the service record, 40 CFR 82.157(l)', () => {
  it('has every item of the list for a visit', async () => {
    const { technician, charge, id, world, circuitId, cylinderNumber } = await aServicedSite()
    await sql(id, `update system set location = 'Roof, north', maker = 'Testmaker', model = 'TM-9', serial = 'SN-77' where id = $1`, [world.systemId])
    const [visitId, componentId, leakId] = [await aVisit(id, world, technician.personId, '2026-05-02'), uuid(), uuid()]
    await sql(id, `insert into component (company_id, id, customer_id, circuit_id, kind, name, position) values ($1, $2, $3, $4, 'condenser-coil', '2', 'low')`,
      [id, componentId, world.customerId, circuitId])
    await sql(id, `insert into leak (company_id, id, customer_id, circuit_id, component_id, found_on, cause, method, position, person_id, repaired_on, repair)
      values ($1, $2, $3, $4, $5, '2026-05-02', 'vibration-rub', 'bubbles', 'lower return bend', $6, '2026-05-02', 'Brazed under nitrogen')`,
    [id, leakId, world.customerId, circuitId, componentId, technician.personId])
    await sql(id, `insert into verification (company_id, id, customer_id, circuit_id, leak_id, kind, tested_on, type, passed, shows_all_repaired, person_id)
      values ($1, $2, $3, $4, $5, 'initial', '2026-05-02', 'Nitrogen standing pressure', true, false, $6)`, [id, uuid(), world.customerId, circuitId, leakId, technician.personId])
    await sql(id, `insert into watch_mark (company_id, id, customer_id, circuit_id, component_id, text, marked_on, person_id) values ($1, $2, $3, $4, $5, 'Same nick on the sister coil', '2026-04-01', $6)`,
      [id, uuid(), world.customerId, circuitId, componentId, technician.personId])
    await charge({ pounds: '5', on: '2026-02-01' })
    await charge({
      pounds: '10', on: '2026-05-02', visitId, leakId, part: 'Condenser coil 2', workDone: 'Leak brazed, drier replaced', note: 'Ran two hours',
      entered: { unit: 'lb', before: '58.5', after: '48.5', amount: null },
    })
    const { text, headers } = await pdfOf(technician, `/api/papers/service-record.pdf?visitId=${visitId}`)
    for (const item of [
      'RTU-1 · Circuit', 'Roof, north', '1 Test Street', 'Testmaker TM-9', 'SN-77', 'May 2, 2026 · R-22', 'Condenser coil 2', 'Leak brazed, drier replaced', 'Test technician',
      'certificate TC-0001, Universal', '10.00 lb', '= 10.00 lb = 4.5359237 kg, exact', '58.5 lb', '48.5 lb', cylinderNumber, '100.00 lb (45.36 kg), Manufacturer\'s figure',
      'Leak rate 40.56 % of full charge per 12 months. Threshold: above 10 %. The rate is above it.', 'Annualizing method: 10.00 lb ÷ 100.00 lb × 365 ÷ 90 days × 100 = 40.56 %',
      'Vibration rub', 'Bubbles', 'Brazed under nitrogen', 'Nitrogen standing pressure', 'Passed', 'Same nick on the sister coil', 'Ran two hours', 'Alarm on the first stage',
      '40 CFR 82.157(c)(2)', CAUTION, RESPONSIBLE,
    ]) expect(text).toContain(item)
    expect(headers['content-disposition']).toBe('attachment; filename="service-record_test-site_2026-05-02.pdf"')
  })

  it('spells readings in pounds and ounces out', async () => {
    const { technician, charge } = await aServicedSite()
    const { id } = await charge({ pounds: '9', on: '2026-02-01', entered: { unit: 'lb-oz', before: '37-4', after: '28-4.5', amount: null } })
    const { text } = await pdfOf(technician, `/api/papers/service-record.pdf?postingId=${id}`)
    for (const reading of ['37 lb 4 oz', '28 lb 4.5 oz']) expect(text).toContain(reading)
  })

  it('shows what is missing as missing', async () => {
    const { technician, charge } = await aServicedSite()
    const { id } = await charge({ pounds: '5', on: '2026-02-01', purpose: null })
    const { text } = await pdfOf(technician, `/api/papers/service-record.pdf?postingId=${id}`)
    for (const item of [
      'Scale readings not recorded: the net amount was entered', 'Part of the appliance not recorded', 'Type of work on that part not recorded', 'Purpose not recorded',
      'Serial number not recorded', 'Maker and model not recorded', 'No leak recorded as found or repaired.',
      'No verification test recorded.', 'No watch mark on this circuit.',
    ]) expect(text).toContain(item)
    // address of the owner, maker, serial number, readings, amount as entered, part, purpose, work
    expect(text.match(/not recorded/g)).toHaveLength(8)
  })

  it('says that an entry was taken back, and why, also when the reversal itself is asked for', async () => {
    const { officer, charge } = await aServicedSite()
    const wrong = await charge({ pounds: '5', on: '2026-02-01' })
    const reversal = await post(officer, { kind: 'reversal', reversesId: wrong.id, reason: 'Wrong cylinder', on: '2026-02-03' })
    for (const id of [wrong.id, reversal.id]) {
      const { text } = await pdfOf(officer, `/api/papers/service-record.pdf?postingId=${id}`)
      expect(text).toContain('Taken back by Test officer on Feb 3, 2026: Wrong cylinder')
      expect(text).toContain('Leak rate: none, since the entry was taken back.')
    }
  })

  it('does not show an owner the cylinders of the company', async () => {
    const { owner, charge, world, cylinderNumber } = await aServicedSite()
    const { id } = await charge({ pounds: '5', on: '2026-02-01' })
    const { text } = await pdfOf(await owner(world.customerId), `/api/papers/service-record.pdf?postingId=${id}`)
    expect(text).toContain('kept in the ledger of the servicing company')
    expect(text).not.toContain(cylinderNumber)
  })

  it('is not there for other owners, for purchases, and for what does not exist', async () => {
    const { owner, officer, charge, id: companyId, cylinderId, world } = await aServicedSite()
    const { id } = await charge({ pounds: '5', on: '2026-02-01' })
    const visitId = await aVisit(companyId, world, officer.personId, '2026-02-01')
    const stranger = await owner((await aWorld(server, companyId)).customerId)
    const purchase = await post(officer, { kind: 'purchase', pounds: '1', cylinderId, partnerId: await aPartnerRow(server, companyId), on: '2026-02-02' })
    await stranger.get(`/api/papers/service-record.pdf?postingId=${id}`).expect(404)
    await stranger.get(`/api/papers/service-record.pdf?visitId=${visitId}`).expect(404)
    await officer.get(`/api/papers/service-record.pdf?postingId=${purchase.id}`).expect(404)
    await officer.get(`/api/papers/service-record.pdf?postingId=${uuid()}`).expect(404)
    await officer.get('/api/papers/service-record.pdf').expect(422)
    await officer.get(`/api/papers/service-record.pdf?visitId=${visitId}&postingId=${id}`).expect(422)
  })
})

const SIGNS = '≥ ≤ ² ° · – ’ é µ × ÷ − ½ § “quoted” … ₂ → ü ñ Å'
const sheetOf = (): Sheet => new Sheet({
  paper: 'A4', language: 'en', title: 'Signs', subject: '', author: 'Test', madeAt: new Date(0), runningHead: 'Signs', footer: 'Foot', pageLabel: (page, pages) => `Page ${page} of ${pages}`,
})
async function readBack(draw: (sheet: Sheet) => void): Promise<{ text: string; bytes: Buffer }> {
  const sheet = sheetOf()
  draw(sheet)
  sheet.finish()
  const parts: Buffer[] = []
  for await (const part of sheet.document) parts.push(part as Buffer)
  const bytes = Buffer.concat(parts)
  return { text: pdfText(bytes), bytes }
}

describe('text on paper, read back by another program', () => {
  it('is whole: signs of the trade and every refrigerant by name', async () => {
    expect(REFRIGERANTS).toHaveLength(61)
    const names = REFRIGERANTS.map(({ id }) => id).join(', ')
    const { text } = await readBack((sheet) => {
      sheet.text(SIGNS)
      sheet.text(names)
    })
    expect(text).toContain(SIGNS)
    expect(text).toContain(names)
  })

  it('keeps signs that the font lacks, in what is read aloud and copied', async () => {
    const { text } = await readBack((sheet) => sheet.text('冷媒 R-32 at the roof'))
    expect(text).toContain('冷媒 R-32 at the roof')
  })

  it.each([
    '</script><script>alert(1)</script>', ') Tj ET BT (forged', '\\) /JS (app.alert(1)) /S /JavaScript', 'javascript:alert(1)', 'https://link.example/path',
    '=HYPERLINK("https://link.example")', 'a < b && c > d {named} @:papers.page | two', '%PDF-1.7 endobj',
  ])('holds %s as text and nothing else', async (hostile) => {
    const { text, bytes } = await readBack((sheet) => sheet.text(hostile))
    expect(text).toContain(hostile)
    expect(bytes.toString('latin1')).not.toMatch(/\/(JS|JavaScript|URI|Launch|OpenAction|AA|Annots) /)
  })

  it('numbers the pages of a long paper and repeats nothing on them as content', async () => {
    const { text, bytes } = await readBack((sheet) => {
      for (let at = 0; at < 200; at += 1) sheet.text(`Line ${at}`)
    })
    const pages = Number(/Pages: +(\d+)/.exec(pdfInfo(bytes))?.[1])
    expect(pages).toBeGreaterThan(2)
    for (let page = 1; page <= pages; page += 1) expect(text).toContain(`Page ${page} of ${pages}`)
    expect(text.match(/Line \d+/g)).toHaveLength(200)
  })
})

describe('the ledger as CSV', () => {
  it('has every entry with exact kilograms, in the order of the events', async () => {
    const { auditor, charge } = await aServicedSite()
    await charge({ pounds: '12.5', on: '2026-05-02', note: 'Two lines\nof "note", here' })
    const { text, headers } = await auditor.get('/api/papers/entries.csv?from=2026-05-01&to=2026-05-31').expect(200)
    const rows: Record<string, string>[] = parse(text, { columns: true })
    // worked by hand: 12.5 lb × 0.45359237 = 5.669904625 kg; a complete charge of a full circuit reveals as much as lost
    expect(rows.map((row) => [row.Account, row['Mass [kg]'], row['Mass [lb], rounded']])).toEqual([
      ['cylinder', '-5.669904625', '-12.5000'], ['circuit', '5.669904625', '12.5000'], ['circuit', '-5.669904625', '-12.5000'], ['air', '5.669904625', '12.5000'],
    ])
    expect(rows[0]?.Note).toBe('Two lines\nof "note", here')
    expect(text.endsWith('\r\n')).toBe(true)
    expect(headers).toMatchObject({
      'content-type': 'text/csv; charset=utf-8; header=present', 'x-content-type-options': 'nosniff', 'content-disposition': 'attachment; filename="ledger-entries_2026-05-01_2026-05-31.csv"',
    })
  })

  it('guards every text that a spreadsheet would take for a formula, and no number', async () => {
    const hostile = ['=1+1', '+1', '-1', '@SUM(A1)', '\t=1', '\r=1', '=cmd|\'/c calc\'!A0', '=HYPERLINK("https://link.example","x")', '＝1+1', '-2+3+cmd|x', '+49 30', '@home']
    for (const cell of hostile) expect(textCell(cell)).toBe(`'${cell}`)
    for (const cell of ['R-22', '1-2', 'a=b', "'=1", '', ' -1']) expect(textCell(cell)).toBe(cell)
    const { auditor, charge } = await aServicedSite()
    await charge({ pounds: '1', on: '2026-05-02', note: '=HYPERLINK("https://link.example")', part: '@SUM(A1)', workDone: '+1' })
    const { text } = await auditor.get('/api/papers/entries.csv?from=2026-05-01').expect(200)
    const [row]: Record<string, string>[] = parse(text, { columns: true })
    expect([row?.Note, row?.Part, row?.['Work done'], row?.['Mass [kg]']]).toEqual(['\'=HYPERLINK("https://link.example")', "'@SUM(A1)", "'+1", '-0.45359237'])
  })

  it('comes out whole over many batches of the cursor', async () => {
    const { auditor, id, officer, cylinderId } = await aServicedSite()
    await sql(id, `with made as (
        insert into posting (company_id, id, kind, occurred_on, occurred_at, person_id, refrigerant, mass_kg, cylinder_id, is_complete, content_hash)
        select $1, gen_random_uuid(), 'opening-stock', '2025-06-01', '2025-06-01T12:00:00Z'::timestamptz + n * interval '1 second', $2, 'R-22', 0.001, $3, true, '\\x00'
          from generate_series(1, 3000) n returning id)
      insert into entry (company_id, posting_id, line, account_id, refrigerant, mass_kg)
      select $1, made.id, line, case line when 1 then (select id from account where company_id = $1 and kind = 'variance') else $3 end, 'R-22', case line when 1 then -0.001 else 0.001 end
        from made, generate_series(1, 2) line`, [id, officer.personId, cylinderId])
    const { text } = await auditor.get('/api/papers/entries.csv?from=2025-06-01&to=2025-06-01').expect(200)
    const rows: Record<string, string>[] = parse(text, { columns: true })
    expect(rows).toHaveLength(6000)
    expect(new Set(rows.map((row) => row.Posting)).size).toBe(3000)
    const instants = rows.map((row) => row['Instant (UTC)'] ?? '')
    expect(instants).toEqual(instants.toSorted())
  })

  it('shows a company its own entries only, and nobody but the office and the auditor', async () => {
    const [one, other] = [await aServicedSite(), await aServicedSite()]
    const { text } = await one.auditor.get('/api/papers/entries.csv').expect(200)
    expect(text).toContain(one.cylinderNumber)
    expect(text).not.toContain(other.cylinderNumber)
    for (const path of ['/api/papers/entries.csv', '/api/papers/cylinder-ledger.csv?year=2026']) {
      await one.technician.get(path).expect(403)
      await (await one.owner(one.world.customerId)).get(path).expect(403)
      for (const client of [one.officer, one.auditor, one.administrator]) await client.get(path).expect(200)
    }
    await one.auditor.get('/api/papers/cylinder-ledger.csv').expect(422)
    await one.auditor.get('/api/papers/cylinder-ledger.csv?year=20x6').expect(422)
    await one.auditor.get('/api/papers/entries.csv?from=2026-02-01&to=2026-01-01').expect(422)
  })
})

describe('a calculation that was put into a visit', () => {
  it('stands in the service record as it was shown, once, and only in a visit of this company', async () => {
    const company = await aCompany(server)
    const site = await aSite(company.officer)
    const visit = { id: uuid(), siteId: site.id, visitedOn: '2026-11-20', remark: null }
    await company.technician.post('/api/visits', visit).expect(201)
    const calculation = { id: uuid(), calculator: 'standing', title: 'Standing pressure test', lines: [{ label: 'Expected by temperature alone', value: '388.4 psig' }] }
    await company.technician.post(`/api/visits/${visit.id}/calculations`, calculation).expect(201)
    const { body } = await company.technician.post(`/api/visits/${visit.id}/calculations`, calculation).expect(201)
    expect(body.calculations).toHaveLength(1)
    const { body: pdf } = await asBuffer(company.officer.get(`/api/papers/service-record.pdf?visitId=${visit.id}`).expect(200))
    expect(pdfText(pdf)).toContain('388.4 psig')
    await (await aCompany(server)).technician.post(`/api/visits/${visit.id}/calculations`, { ...calculation, id: uuid() }).expect(404)
  })
})
