import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { anApplication, type Application } from '../support/application'
import { openBrowser, PHONE, signedIn } from '../support/browser'

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

const result = (page: Page) => page.getByRole('region', { name: 'Result' })

describe('the bench', () => {
  it('tells a technician the pressure of R-410A at 77 °F and the limit of a table, and attaches a result to a visit', async () => {
    const technician = await signedIn(browser, application.baseUrl, 'technician', PHONE)
    const { page } = technician
    await page.goto('/bench?tool=saturation')
    await page.getByLabel('Temperature (°F)').fill('77')
    // 1,657 kPa absolute (ASHRAE Handbook Fundamentals, from memory) are 225.6 psig at sea level: (1657 − 101.325) / 6.894757
    const shown = async () => Number(/Bubble pressure\s*([\d.]+)/.exec(await result(page).textContent() ?? '')?.[1])
    await expect.poll(shown).toBeGreaterThan(223)
    expect(await shown()).toBeLessThan(228)
    await page.getByLabel('Temperature (°F)').fill('500')
    await expect.poll(() => result(page).textContent()).toContain('Nothing is guessed beyond it')
    await page.getByLabel('Temperature (°F)').fill('40')
    await page.getByRole('button', { name: 'Attach to a visit' }).click()
    await page.getByRole('dialog').getByRole('button', { name: /,/ }).first().click()
    await page.getByText(/Attached to the visit/).first().waitFor()
    const { rows } = await (await page.request.get(`${application.baseUrl}/api/visits`)).json() as { rows: { calculations: { calculator: string }[] }[] }
    expect(rows.flatMap(({ calculations }) => calculations).map(({ calculator }) => calculator)).toContain('saturation')
    expect(technician.complaints).toEqual([])
    await technician.context.close()
  }, 2 * MINUTES)

  it('works without a line, also after the page is loaded anew', async () => {
    const { page, context } = await signedIn(browser, application.baseUrl, 'technician', PHONE)
    await page.goto('/bench?tool=standing')
    await page.evaluate(async () => { await navigator.serviceWorker.ready })
    await page.reload()
    await page.locator('h1').waitFor()
    await expect.poll(() => page.evaluate(() => navigator.serviceWorker.controller !== null)).toBe(true)
    await page.reload()
    await page.getByLabel(/Pressure at the start/).waitFor()
    await context.setOffline(true)
    await page.reload()
    // 400 psig at 75 °F is 388.4 psig at 60 °F: worked by hand, ideal gas at constant volume
    await page.getByLabel(/Pressure at the start/).fill('400')
    await page.getByLabel(/Temperature at the start/).fill('75')
    await page.getByLabel(/Pressure at the end/).fill('385')
    await page.getByLabel(/Temperature at the end/).fill('60')
    await expect.poll(() => result(page).textContent()).toContain('388.4 psig')
    expect(await result(page).textContent()).toContain('a leak')
    await page.goto('/bench?tool=fill')
    await page.getByLabel('Refrigerant').waitFor()
    await context.close()
  }, 2 * MINUTES)
})
