import { spawn } from 'node:child_process'
import { createServer } from 'node:net'

/** Runs a command to its end. @returns its exit code and what it printed (nothing where it prints to our own output) */
export function runCommand(command, args, { cwd, env, isQuiet = false } = {}) {
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, { cwd, env, stdio: isQuiet ? ['ignore', 'pipe', 'pipe'] : ['ignore', 'inherit', 'inherit'] })
    let output = ''
    child.stdout?.on('data', (text) => { output += text })
    child.stderr?.on('data', (text) => { output += text })
    child.on('error', reject)
    child.on('close', (code) => resolve({ code: code ?? 1, output }))
  })
}

/** Whether a port of loopback is free. */
export function isFree(port) {
  return new Promise((resolve) => {
    const probe = createServer()
    probe.once('error', () => resolve(false))
    probe.listen(port, '127.0.0.1', () => probe.close(() => resolve(true)))
  })
}

/** A free port of loopback, chosen by the system. */
export function freePort() {
  return new Promise((resolve, reject) => {
    const probe = createServer()
    probe.once('error', reject)
    probe.listen(0, '127.0.0.1', () => {
      const { port } = probe.address()
      probe.close(() => resolve(port))
    })
  })
}
