import { cpSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { isDeepStrictEqual } from 'node:util'
import { runCommand } from './lifecycle.mjs'
import { inRoot } from './places.mjs'
import { installMissing } from './prepare.mjs'
import { run } from './processes.mjs'
import { makeSteps } from './steps.mjs'

const debian = ['python3-mpmath', 'python3-scipy', 'r-cran-gstat', 'proj-bin']
const python = '/usr/bin/python3'

/**
 * What makes each file of reference values; those that print are written from their output. The table of coordinate
 * systems is not here: it takes minutes, and tests compare it with its own reference points (crs-table.py).
 * @type {{ name: string, command: string, script: string, prints: boolean }[]}
 */
const references = [
  ...[
    'bessel-functions',
    'corrections',
    'distributions',
    'hydraulics-fits',
    'laplace-solutions',
    'leaky-fits',
    'leaky-functions',
    'numerics-functions',
    'published-cases',
    'readings-filters',
    'readings-zones',
    'regional-statistics',
    'robust-fits',
    'test-kinds',
    'units-factors',
  ].map((name) => ({ name, command: python, script: `${name}.py`, prints: true })),
  { name: 'gstat-kriging', command: 'Rscript', script: 'gstat-kriging.R', prints: true },
  { name: 'gstat-means', command: 'Rscript', script: 'gstat-means.R', prints: true },
  { name: 'crs-geodesics', command: 'sh', script: 'crs-geodesics.sh', prints: false },
]

/** `npm run references`: makes the reference values anew in a copy, and says which differ from those that are kept. */
await runCommand(async (life) => {
  const steps = makeSteps()
  await installMissing(debian, steps, life.stopping)
  const folder = mkdtempSync(join(tmpdir(), 'bb-references-'))
  life.onClose(() => rmSync(folder, { recursive: true, force: true }))
  cpSync(inRoot('tests/reference'), folder, { recursive: true })
  let status = 0
  for (const reference of references) {
    life.stopping.throwIfAborted()
    const same = await steps.step(reference.name, () => remake(reference, folder))
    if (!same) status = 1
    steps.say(`${reference.name}: ${same ? 'the same' : 'DIFFERENT'}`)
  }
  return status
})

/**
 * @param {(typeof references)[number]} reference
 * @param {string} folder
 */
async function remake({ name, command, script, prints }, folder) {
  const output = await run(command, [join(folder, script)], { cwd: folder })
  const file = join(folder, `${name}.json`)
  if (prints) writeFileSync(file, output)
  return isDeepStrictEqual(values(file), values(inRoot(`tests/reference/${name}.json`)))
}

/**
 * The values alone: another version of the tool may well give the same.
 * @param {string} file
 */
function values(file) {
  const { provenance: _provenance, ...rest } = JSON.parse(readFileSync(file, 'utf8'))
  return rest
}
