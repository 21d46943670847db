import { setTimeout as sleep } from 'node:timers/promises'
import { markIsAlive } from './lock.mjs'
import { readJson, say } from './project.mjs'

/** Ends the web server that a start which was killed left behind; told by its number and its start time. */
export async function endLeftover(/** @type {string} */ runFile) {
  const mark = readJson(runFile)?.web
  if (typeof mark !== 'string' || !markIsAlive(mark)) return
  const pid = Number(mark.split('-')[0])
  say(`Ending the web server that the last start left behind (process ${pid}).`)
  process.kill(pid, 'SIGTERM')
  for (let waited = 0; waited < 5000 && markIsAlive(mark); waited += 100) await sleep(100)
  if (markIsAlive(mark)) process.kill(pid, 'SIGKILL')
}
