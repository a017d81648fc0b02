import { LauncherProblem } from './problem.mjs'

const cleanups = []
let ending = null

/** Has something undone when the command ends, however it ends; the newest first. */
export function onEnd(cleanup) {
  cleanups.push(cleanup)
}

/** Undoes everything and ends the process. A second call waits for the first. */
export function end(code) {
  ending ??= (async () => {
    for (const cleanup of cleanups.reverse()) {
      try {
        await cleanup()
      } catch (error) {
        console.error(error instanceof LauncherProblem ? error.message : error)
      }
    }
    process.exit(code)
  })()
  return ending
}

/** @returns whether the command has begun to end */
export const isEnding = () => ending !== null

/**
 * Runs a command: SIGINT, SIGTERM and SIGHUP undo what was set up; a problem is printed as one message.
 * @param main resolves to the exit code
 */
export async function runCommand(main) {
  const codes = { SIGHUP: 129, SIGINT: 130, SIGTERM: 143 }
  for (const [signal, code] of Object.entries(codes)) process.on(signal, () => void end(code))
  try {
    await end((await main()) ?? 0)
  } catch (error) {
    if (ending) return
    console.error(error instanceof LauncherProblem ? error.message : error)
    await end(1)
  }
}
