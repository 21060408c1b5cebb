import { mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { isSameProcess, thisProcess } from './processes.mjs'
import { dataFolder } from './project.mjs'
import { Stop } from './say.mjs'

const file = join(dataFolder, 'running')

/** Makes sure that one start at a time uses this working copy's database. @throws Stop if another does */
export function beTheOnlyOne(atEnd) {
  mkdirSync(dataFolder, { recursive: true, mode: 0o700 })
  const other = readOther()
  if (other && isSameProcess(other))
    throw new Stop(`Weighback already runs from this folder (process ${other.split(' ')[0]}). Stop that one first, by Ctrl-C where it was started.`)
  writeFileSync(file, thisProcess())
  atEnd(() => rmSync(file, { force: true }))
}

function readOther() {
  try {
    return readFileSync(file, 'utf8')
  } catch {
    return null
  }
}
