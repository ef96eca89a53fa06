import { runCommand } from './lifecycle.mjs'
import { installMissing } from './prepare.mjs'
import { SetupProblem } from './problem.mjs'
import { makeSteps, seconds } from './steps.mjs'
import { manyCores, singleCore } from './test-checks.mjs'
import { runChecks } from './test-run.mjs'

const debian = ['mariadb-server-core', 'mariadb-client', 'chromium']
const longestMs = 25 * 60_000

/** `npm test`: every check there is; the last line says how many tests passed and failed. */
await runCommand(
  async (life) => {
    const begun = performance.now()
    const steps = makeSteps()
    await installMissing(debian, steps, life.stopping)
    const stopping = AbortSignal.any([life.stopping, AbortSignal.timeout(longestMs)])
    const options = { stopping, say: steps.say }
    const outcomes = [
      ...(await runChecks(singleCore, { ...options, atOnce: 2 })),
      ...(await runChecks(manyCores, { ...options, atOnce: 1 })),
    ]
    if (stopping.aborted) throw new SetupProblem(`The checks were stopped after ${seconds(longestMs)}.`)
    const passed = outcomes.reduce((sum, outcome) => sum + outcome.passed, 0)
    const failed = outcomes.reduce((sum, outcome) => sum + outcome.failed, 0)
    steps.say(`Everything took ${seconds(performance.now() - begun)}.`)
    steps.say(`${passed} passed, ${failed} failed`)
    return failed === 0 ? 0 : 1
  },
  { interrupted: 130 },
)
