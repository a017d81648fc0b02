// A throw-away PostgreSQL to develop against: prints its URL and lives until Ctrl-C.
import { onEnd, runCommand } from './command.mjs'
import { startThrowAway } from './postgres/throwAway.mjs'
import { say } from './steps.mjs'

await runCommand(async () => {
  const { url, stop } = await startThrowAway()
  onEnd(stop)
  say(url)
  await new Promise(() => setInterval(() => {}, 2 ** 30))
})
