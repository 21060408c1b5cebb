import { createHash } from 'node:crypto'
import { basename, dirname, join } from 'node:path'
import { fileURLToPath } from 'node:url'

/** The project's own folder, whatever folder the script was called from. */
export const projectFolder = dirname(dirname(dirname(fileURLToPath(import.meta.url))))

export const inProject = (...parts) => join(projectFolder, ...parts)

/** What this working copy keeps between runs: settings, received mail, logs. Not in git. */
export const dataFolder = inProject('.data')

const pathHash = createHash('sha256').update(projectFolder).digest('hex')

/** Tells this working copy from others on the machine: the folder's name and a hash of its whole path. */
export const projectName = `${basename(projectFolder).toLowerCase().replace(/[^a-z0-9]+/g, '-') || 'project'}-${pathHash.slice(0, 10)}`

/** A number from 0 to `below` - 1 that stays the same for this path. */
export const pathNumber = (below) => Number.parseInt(pathHash.slice(0, 8), 16) % below
