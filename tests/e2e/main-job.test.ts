import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { CircuitStanding, WireSite } from '../../shared/api/places'
import type { Page as Rows } from '../../shared/api/page'
import { anApplication, type Application } from '../support/application'
import { axe, DESK, openBrowser, PHONE, signedIn, type Person } from '../support/browser'
import { pdfText } from '../support/paper-text'

const MINUTES = 60_000
let application: Application
let browser: Browser
beforeAll(async () => {
  application = await anApplication()
  browser = await openBrowser()
}, 3 * MINUTES)
afterAll(async () => {
  await browser.close()
  await application.close()
})

/** What the API says to the person at the screen. */
const ask = async <Answer>(person: Person, path: string): Promise<Answer> => (await person.page.request.get(`${application.baseUrl}${path}`)).json() as Promise<Answer>

/** The circuit of the story: RTU-4, circuit 1, of the demo's office court; near its threshold of 10 %. */
const theCircuit = async (person: Person): Promise<CircuitStanding> => {
  const { rows } = await ask<Rows<CircuitStanding>>(person, '/api/circuits?search=RTU-4+Tollgate')
  const circuit = rows.find((row) => row.standing === 'near')
  if (!circuit) throw new Error('The demo has no circuit near its threshold.')
  return circuit
}

describe('the main job, from the scale to the paper', () => {
  it('lets a technician on a phone post a charge that passes the threshold, and warns before it is posted', async () => {
    const technician = await signedIn(browser, application.baseUrl, 'technician', PHONE)
    const { page } = technician
    expect(new URL(page.url()).pathname).toBe('/today')
    const before = await theCircuit(technician)
    await page.goto(`/circuits/${before.id}/weigh`)
    await page.getByRole('heading', { level: 1 }).waitFor()
    await page.locator('label', { hasText: /^.*S-\d+/ }).first().click()
    const scale = page.locator('section, fieldset').filter({ hasText: 'Two readings' }).last()
    await scale.waitFor()
    await page.getByText('Net amount', { exact: true }).first().click()
    await page.locator('input[inputmode=decimal]').first().fill('3')
    const outlook = page.locator('section', { hasText: 'Before it is posted' }).last()
    await expect.poll(() => outlook.textContent()).toContain('40 CFR 82.157(c)(2)')
    expect(await outlook.textContent()).toContain('Local regulation and licensed practice decide')
    await page.getByRole('button', { name: 'Review' }).click()
    await page.getByRole('heading', { name: 'Right so?' }).waitFor()
    expect(await page.locator('main').textContent()).toContain('Find and repair the leaks')
    await page.getByRole('button', { name: 'Post it' }).click()
    await page.getByRole('heading', { name: /posted/i }).waitFor()
    const after = await theCircuitById(technician, before.id)
    expect(after.standing).toBe('over')
    expect(Number(after.ratePercent)).toBeGreaterThan(10)
    expect(technician.complaints).toEqual([])
    await technician.context.close()
  }, 2 * MINUTES)

  it('shows the officer the circuit over its threshold, and prints the leak-rate summary with its source and caution', async () => {
    const officer = await signedIn(browser, application.baseUrl, 'officer', DESK)
    const { page } = officer
    expect(new URL(page.url()).pathname).toBe('/overview')
    await page.getByText('RTU-4').first().waitFor()
    const { rows } = await ask<Rows<CircuitStanding>>(officer, '/api/circuits?search=RTU-4+Tollgate&standing=over')
    const circuit = rows[0]
    if (!circuit) throw new Error('The charge did not pass the threshold.')
    await page.goto(`/sites/${circuit.siteId}`)
    const link = page.getByRole('link', { name: 'Open the PDF' })
    await link.waitFor()
    const answer = await page.request.get(`${application.baseUrl}${await link.getAttribute('href') ?? ''}`)
    expect(answer.headers()['content-type']).toBe('application/pdf')
    const text = pdfText(await answer.body())
    for (const words of ['RTU-4', 'R-22', '40 CFR 82.157(c)(2)', 'Local regulation and licensed practice decide', 'Mara Quill']) expect(text).toContain(words)
    expect(officer.complaints).toEqual([])
    await officer.context.close()
  }, 2 * MINUTES)

  it('takes a posting back with a reason that stays in sight', async () => {
    const officer = await signedIn(browser, application.baseUrl, 'officer', DESK)
    const { page } = officer
    const { rows } = await ask<Rows<{ id: string; kind: string }>>(officer, '/api/postings?kind=charge&limit=1')
    await page.goto(`/postings/${rows[0]?.id ?? ''}`)
    await page.getByRole('button', { name: 'Take it back' }).click()
    await page.getByLabel('Why it is taken back', { exact: false }).fill('The scale was not zeroed')
    await page.getByRole('button', { name: 'Post the reversal' }).click()
    const reversal = async () => (await ask<Rows<{ reason: string; reversesId: string }>>(officer, '/api/postings?kind=reversal&limit=200')).rows.find(({ reversesId }) => reversesId === rows[0]?.id)
    await expect.poll(async () => (await reversal())?.reason).toBe('The scale was not zeroed')
    await page.getByText('See the reversal').first().waitFor()
    await officer.context.close()
  }, 2 * MINUTES)

  it('shows the owner own sites alone, without stock', async () => {
    const owner = await signedIn(browser, application.baseUrl, 'owner', PHONE)
    const { page } = owner
    await page.goto('/sites')
    await page.getByText('Larkmoor Cold Store').first().waitFor()
    const { rows } = await ask<Rows<WireSite>>(owner, '/api/sites?limit=200')
    expect(new Set(rows.map(({ customerName }) => customerName))).toEqual(new Set(['Larkmoor Provisions']))
    expect(await page.locator('main').textContent()).not.toContain('Tollgate')
    await page.goto('/cylinders')
    await page.getByRole('heading', { level: 1 }).waitFor()
    expect(await page.locator('main').textContent()).not.toContain('S-10')
    expect((await page.request.get(`${application.baseUrl}/api/cylinders`)).status()).toBe(403)
    await owner.context.close()
  }, 2 * MINUTES)

  it('lets the auditor take the yearly cylinder ledger away, check the ledger, and change nothing', async () => {
    const auditor = await signedIn(browser, application.baseUrl, 'auditor', DESK)
    const { page } = auditor
    await page.goto('/papers')
    const [download] = await Promise.all([page.waitForEvent('download'), page.getByRole('link', { name: 'Download the CSV' }).first().click()])
    expect(download.suggestedFilename()).toMatch(/\.csv$/)
    const stream = await download.createReadStream()
    const parts: Buffer[] = []
    for await (const part of stream) parts.push(part as Buffer)
    expect(Buffer.concat(parts).toString('utf8')).toContain('R-22')
    await page.goto('/check')
    await page.getByRole('button', { name: 'Check now' }).click()
    await page.getByText('The ledger is whole.').first().waitFor()
    const circuit = await theAnyCircuit(auditor)
    await page.goto(`/circuits/${circuit.id}`)
    await page.getByRole('heading', { level: 1 }).waitFor()
    expect(await page.getByRole('link', { name: 'Weigh in' }).count()).toBe(0)
    const refused = await page.request.post(`${application.baseUrl}/api/postings`, { headers: { 'X-Requested-With': 'weighback', 'Idempotency-Key': circuit.id }, data: {} })
    expect(refused.status()).toBe(403)
    expect(await axe(page)).toEqual([])
    await auditor.context.close()
  }, 2 * MINUTES)

  it('keeps a weighing when the line is lost, and sends it once when it is back', async () => {
    const technician = await signedIn(browser, application.baseUrl, 'technician', PHONE)
    const { page, context } = technician
    const circuit = await theAnyCircuit(technician, 'R-22')
    const before = (await ask<Rows<{ id: string }>>(technician, `/api/postings?circuitId=${circuit.id}&limit=200`)).rows.length
    await page.goto(`/circuits/${circuit.id}/weigh`)
    await page.locator('label', { hasText: /^.*S-\d+/ }).first().click()
    await page.getByText('Net amount', { exact: true }).first().click()
    await page.locator('input[inputmode=decimal]').first().fill('1')
    await page.getByRole('button', { name: 'Review' }).click()
    await page.getByRole('heading', { name: 'Right so?' }).waitFor()
    await context.setOffline(true)
    await page.getByRole('button', { name: 'Post it' }).click()
    await page.getByRole('button', { name: 'Send again' }).waitFor()
    await context.setOffline(false)
    await page.getByRole('button', { name: 'Send again' }).click()
    await page.getByRole('heading', { name: /posted/i }).waitFor()
    const after = (await ask<Rows<{ id: string }>>(technician, `/api/postings?circuitId=${circuit.id}&limit=200`)).rows.length
    expect(after).toBe(before + 1)
    await context.close()
  }, 2 * MINUTES)
})

const theCircuitById = async (person: Person, id: string): Promise<CircuitStanding> => ask<CircuitStanding>(person, `/api/circuits/${id}`)
async function theAnyCircuit(person: Person, refrigerant = ''): Promise<CircuitStanding> {
  const { rows } = await ask<Rows<CircuitStanding>>(person, `/api/circuits?limit=200&search=${refrigerant}`)
  const circuit = rows.find((row) => row.status === 'in-service' && row.standing === 'far')
  if (!circuit) throw new Error('The demo has no circuit in service.')
  return circuit
}
