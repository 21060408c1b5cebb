import { readFileSync } from 'node:fs'
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core'
import accounts from '../../fixtures/demo/accounts.json'
import type { Role } from '../../shared/access/roles'

const ARGUMENTS = ['--no-sandbox', '--disable-gpu', '--disable-quic', '--disable-background-networking', '--disable-component-update', '--disable-sync']
export const PHONE = { width: 390, height: 844 }
export const DESK = { width: 1440, height: 900 }

/** Debian's chromium. */
export const openBrowser = (): Promise<Browser> => chromium.launch({ executablePath: '/usr/bin/chromium', args: ARGUMENTS })

export interface Person {
  page: Page
  context: BrowserContext
  /** What the page complained about: errors of its own and breaches of the content policy. */
  complaints: string[]
}

/** A person of the demo company at a screen of some size, signed in through the form. */
export async function signedIn(browser: Browser, baseUrl: string, role: Role, viewport: { width: number; height: number }, scheme: 'light' | 'dark' = 'light'): Promise<Person> {
  const account = accounts.find((each) => each.role === role)
  if (!account) throw new Error(`The demo has no ${role}.`)
  const context = await browser.newContext({ viewport, colorScheme: scheme, baseURL: baseUrl, acceptDownloads: true })
  const page = await context.newPage()
  const complaints: string[] = []
  page.on('pageerror', (error) => complaints.push(error.message))
  page.on('console', (message) => {
    if (message.type() === 'error') complaints.push(message.text())
  })
  await page.goto('/sign-in')
  await page.getByLabel('E-mail', { exact: false }).first().fill(account.email)
  await page.locator('input[type=password]').fill(account.password)
  await page.keyboard.press('Enter')
  await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'))
  await page.locator('h1').waitFor()
  return { page, context, complaints }
}

const AXE = readFileSync('node_modules/axe-core/axe.min.js', 'utf8')
const WCAG = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa']

interface AxeResults { violations: { id: string; nodes: { html: string }[] }[] }

/**
 * What axe-core finds against WCAG 2.2 AA on the page as it stands. The script goes in through the
 * debugging protocol, since the page's own content policy lets no script in.
 */
export async function axe(page: Page): Promise<string[]> {
  const session = await page.context().newCDPSession(page)
  await session.send('Runtime.evaluate', { expression: AXE })
  const { result } = await session.send('Runtime.evaluate', {
    expression: `axe.run(document, { runOnly: ${JSON.stringify(WCAG)} })`, awaitPromise: true, returnByValue: true,
  })
  await session.detach()
  return (result.value as AxeResults).violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html.slice(0, 140)).slice(0, 3).join(' | ')}`)
}

/** Whether the page is wider than the screen. */
export const isTooWide = (page: Page): Promise<boolean> => page.evaluate(() => document.documentElement.scrollWidth > window.innerWidth + 1)
