import { spawn } from 'node:child_process'
import { accessSync, constants } from 'node:fs'
import { delimiter, join } from 'node:path'
import { projectFolder } from './project.mjs'

const running = new Set()

/**
 * Runs a program to its end with its output in sight.
 * @param options.isUntouched  true for what must not be broken off, like the system's package manager
 * @returns the exit code; 1 if a signal ended it
 */
export async function show(command, args, { cwd = projectFolder, env = process.env, isUntouched = false } = {}) {
  const child = spawn(command, args, { cwd, env, stdio: 'inherit' })
  if (!isUntouched) running.add(child)
  const { code } = await ended(child).finally(() => running.delete(child))
  return code
}

/**
 * Runs a program to its end and returns what it wrote. In a process group of its own, so that Ctrl-C
 * does not break off half a database command.
 */
export async function capture(command, args, { cwd = '/', env = process.env, input = '' } = {}) {
  const child = spawn(command, args, { cwd, env, detached: true, stdio: ['pipe', 'pipe', 'pipe'] })
  let output = ''
  for (const stream of [child.stdout, child.stderr]) stream.setEncoding('utf8').on('data', (text) => { output += text })
  child.stdin.on('error', () => {}) // the program ended before it read all; its exit code tells
  child.stdin.end(input)
  const { code } = await ended(child)
  return { code, output: output.trim() }
}

function ended(child) {
  return new Promise((resolve, reject) => {
    child.once('error', reject)
    child.once('close', (code, signal) => resolve({ code: code ?? 1, signal }))
  })
}

/** Ends the programs that `show` still runs. */
export function endShown() {
  for (const child of running) child.kill('SIGTERM')
}

/** Whether a program can be called by its name. */
export function isOnPath(program) {
  return (process.env.PATH ?? '').split(delimiter).some((folder) => {
    try {
      accessSync(join(folder, program), constants.X_OK)
      return true
    } catch {
      return false
    }
  })
}

export const isRoot = process.getuid?.() === 0
