import { endShown } from './commands.mjs'
import { say, sentenceOf } from './say.mjs'

/**
 * Runs a script so that whatever it started is stopped again, last started first: at its end, after a
 * failure, and on Ctrl-C. `work` gets an `atEnd` to name what must be stopped.
 *
 * @param interruptedCode  exit code after Ctrl-C: 0 where that is the ordinary end
 */
export function runScript(work, { interruptedCode }) {
  const stops = []
  let ending = null
  const end = (code, lastWord = null) => {
    ending ??= stopAll(stops).then((isClean) => {
      if (isClean && lastWord) say(lastWord)
      process.exit(isClean ? code : 1)
    })
    return ending
  }
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'])
    process.on(signal, () => {
      if (ending) return
      say('\nStopping …')
      endShown()
      void end(interruptedCode, 'Stopped.')
    })
  return work((stop) => stops.push(stop)).then(
    (code) => end(code),
    (error) => {
      if (!ending) console.error(`\n${sentenceOf(error)}`) // while ending, programs break off because we ended them
      return end(1)
    },
  )
}

async function stopAll(stops) {
  let isClean = true
  while (stops.length > 0) {
    try {
      await stops.pop()()
    } catch (error) {
      isClean = false
      console.error(sentenceOf(error))
    }
  }
  return isClean
}
