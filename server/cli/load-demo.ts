import { Database, openDatabase } from '../database'
import { loadDemo } from '../demo/load'

const url = process.env.WEIGHBACK_DATABASE_URL
if (!url) throw new Error('WEIGHBACK_DATABASE_URL is not set: it names the database and the role of the application.')
const source = await openDatabase(url).initialize()
try {
  const count = await loadDemo(new Database(source), new Date())
  console.log(count === null ? 'The demo company is there.' : `The demo company is loaded: ${count} postings.`)
} finally {
  await source.destroy()
}
