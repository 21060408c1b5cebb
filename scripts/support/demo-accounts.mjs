import { readFileSync } from 'node:fs'
import { inProject } from './project.mjs'

/** The demo company's accounts as a table of text. */
export function demoAccounts() {
  const accounts = JSON.parse(readFileSync(inProject('fixtures/demo/accounts.json'), 'utf8'))
  const width = (key) => Math.max(...accounts.map((account) => account[key].length))
  return accounts.map(({ role, email, password }) => `  ${role.padEnd(width('role'))}  ${email.padEnd(width('email'))}  ${password}`).join('\n')
}
