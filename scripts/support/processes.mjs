import { readFileSync } from 'node:fs'

const START_FIELD = 19 // of /proc/<pid>/stat, counted from 0 behind the name in brackets: when the process began

/** When a process began, in ticks since the machine did; null if it runs no more. */
function beginning(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8')
    return stat.slice(stat.lastIndexOf(')') + 2).split(' ')[START_FIELD] ?? null
  } catch {
    return null
  }
}

/** Names this process so that a later one with the same number is not taken for it. */
export const thisProcess = () => `${process.pid} ${beginning(process.pid)}`

/** Whether the process that `thisProcess` named still runs. */
export function isSameProcess(name) {
  const [pid, began] = name.split(' ')
  return beginning(pid) === began
}
