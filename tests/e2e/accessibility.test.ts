import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Role } from '../../shared/access/roles'
import { anApplication, type Application } from '../support/application'
import { axe, DESK, isTooWide, openBrowser, signedIn } from '../support/browser'

const MINUTES = 60_000
const SMALL_PHONE = { width: 360, height: 780 }
const NARROWEST = { width: 320, height: 640 } // WCAG 2.2, 1.4.10
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

/** The first row of a list, opened; where a list is empty for that role it is an error. */
const FIRST = (list: string): string => `${list} > first`
const SCREENS: Record<Role, readonly string[]> = {
  technician: ['/today', '/circuits', FIRST('/circuits'), '/bench', '/bench?tool=vacuum', '/cylinders', FIRST('/cylinders'), 'weigh', '/account'],
  officer: ['/overview', '/postings', FIRST('/postings'), '/postings/new', '/sites', FIRST('/sites'), '/sites/new', '/customers', FIRST('/customers'), '/partners', '/papers', '/check'],
  owner: ['/overview', '/sites', FIRST('/sites'), '/papers', FIRST('/circuits')],
  auditor: ['/overview', '/people', '/check', FIRST('/postings')],
  administrator: ['/people', '/customers', '/overview'],
}

describe.each(Object.entries(SCREENS) as [Role, readonly string[]][])('every screen of the %s', (role, screens) => {
  it.each([
    ['a small phone, light', SMALL_PHONE, 'light'], ['a small phone, dark', SMALL_PHONE, 'dark'], ['a desk, light', DESK, 'light'], ['a desk, dark', DESK, 'dark'],
  ] as const)('has no fault that axe-core finds and fits %s', async (_what, viewport, scheme) => {
    const person = await signedIn(browser, application.baseUrl, role, viewport, scheme)
    const { page } = person
    const faults: string[] = []
    for (const screen of screens) {
      const [list = '', first] = screen.split(' > ')
      if (screen === 'weigh') await page.goto(await weighInAddress(page))
      else await page.goto(list)
      await page.locator('h1').waitFor()
      await page.waitForLoadState('networkidle')
      if (first) {
        await page.locator('main a.lead, main tbody a').first().click()
        await page.waitForURL((url) => url.pathname.split('/').length > 2)
        await page.locator('h1').waitFor()
        await page.waitForLoadState('networkidle')
      }
      faults.push(...(await axe(page)).map((fault) => `${screen}: ${fault}`))
      if (await isTooWide(page)) faults.push(`${screen}: wider than the screen`)
      if (viewport === SMALL_PHONE) {
        await page.setViewportSize(NARROWEST)
        if (await isTooWide(page)) faults.push(`${screen}: wider than 320 px`)
        await page.setViewportSize(viewport)
      }
    }
    expect(faults).toEqual([])
    expect(person.complaints).toEqual([])
    await person.context.close()
  }, 4 * MINUTES)
})

async function weighInAddress(page: Page): Promise<string> {
  const { rows } = await (await page.request.get(`${application.baseUrl}/api/circuits?limit=1`)).json() as { rows: { id: string }[] }
  return `/circuits/${rows[0]?.id ?? ''}/weigh`
}
