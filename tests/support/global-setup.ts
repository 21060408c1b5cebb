import { makeTemplate } from './database'

/** Once before all test files: a migrated database to copy. Nothing to do where no cluster was started (unit tests alone). */
export async function setup(): Promise<void> {
  if (process.env.WEIGHBACK_TEST_ADMIN_URL) await makeTemplate()
}
