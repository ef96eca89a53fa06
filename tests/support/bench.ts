import { spawnSync } from 'node:child_process'
import { fileURLToPath } from 'node:url'

export interface Reference {
  name: string
  value: number
}

/** One figure of a bench as a line of JSON, beside what it is compared with. */
export function report(bench: string, metric: string, value: number, unit: string, reference?: Reference): void {
  const compared = reference
    ? { reference: reference.name, referenceValue: reference.value, ratio: value / reference.value }
    : { reference: null, referenceValue: null, ratio: null }
  console.log(JSON.stringify({ bench, metric, value, unit, ...compared }))
}

/** Median time of some work in milliseconds; as many runs before warm the compiler up. */
export function medianMilliseconds(runs: number, work: () => void): number {
  const spent: number[] = []
  for (let i = 0; i < 2 * runs; i++) {
    const begin = performance.now()
    work()
    if (i >= runs) spent.push(performance.now() - begin)
  }
  return spent.sort((a, b) => a - b)[Math.floor(runs / 2)] as number
}

/** What a Python script of tests/bench prints as JSON for a job that it reads as JSON. @throws where it cannot be run */
export function fromPython<Answer>(script: string, job: unknown): Answer {
  const path = fileURLToPath(new URL(`../bench/${script}`, import.meta.url))
  const run = spawnSync('/usr/bin/python3', [path], { input: JSON.stringify(job), encoding: 'utf8', maxBuffer: 1e9 })
  if (run.status !== 0) throw new Error(`${script} could not be run: ${run.stderr || run.error?.message}`)
  return JSON.parse(run.stdout) as Answer
}
