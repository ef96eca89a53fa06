import { readdirSync } from 'node:fs'
import { runCommand } from './lifecycle.mjs'
import { inRoot, root } from './places.mjs'
import { installMissing } from './prepare.mjs'
import { SetupProblem } from './problem.mjs'
import { endGroup, ended, startChild } from './processes.mjs'
import { makeSteps } from './steps.mjs'

const references = ['python3-scipy', 'r-cran-gstat', 'gdal-bin']
const needed = ['mariadb-server-core', 'mariadb-client', 'chromium', ...references]

/** `npm run bench [-- name …]`: the figures go to standard output, one line of JSON each; the rest to standard error. */
await runCommand(async (life) => {
  const steps = makeSteps(process.stderr)
  await installMissing(needed, steps, life.stopping)
  let status = 0
  for (const name of chosen(process.argv.slice(2))) {
    if (life.stopping.aborted) break
    steps.say(`Bench ${name}`)
    if ((await bench(name, life)) !== 0) status = 1
  }
  return status
})

/**
 * @param {string[]} wanted
 * @returns {string[]}
 */
function chosen(wanted) {
  const all = readdirSync(inRoot('tests/bench'))
    .filter((file) => file.endsWith('.ts'))
    .map((file) => file.replace(/\.ts$/, ''))
    .sort()
  const unknown = wanted.filter((name) => !all.includes(name))
  if (unknown.length > 0)
    throw new SetupProblem(`There is no bench ${unknown.join(', ')}. There are: ${all.join(', ')}.`)
  return wanted.length > 0 ? wanted : all
}

/**
 * @param {string} name
 * @param {import('./lifecycle.mjs').Life} life
 */
async function bench(name, { stopping }) {
  const child = startChild(process.execPath, ['--import', 'tsx', inRoot(`tests/bench/${name}.ts`)], {
    cwd: root,
    stdio: ['ignore', 'inherit', 'inherit'],
  })
  const stop = () => void endGroup(child, 10_000)
  stopping.addEventListener('abort', stop, { once: true })
  const status = await ended(child)
  stopping.removeEventListener('abort', stop)
  return status
}
