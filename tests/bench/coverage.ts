/**
 * Share of seeds whose 95 % intervals hold the truth, for every solution and method: white noise over seeds 1 to 2,000
 * (1 to 500 where solved in Laplace space), noise alike from reading to reading over 1 to 500 (1 to 100). A number as
 * first argument divides the seeds for a shorter run.
 */
import { coverage, type Family } from '../shared/hydraulics/intervals/family.ts'
import { families } from '../shared/hydraulics/intervals/index.ts'

const CORRELATED = [0.5, 0.9]
const shorter = Number(process.argv[2] ?? 1)

/** White noise: 93 to 97 % (92 to 98 % for fewer seeds) is wanted; correlated noise: at least 88 %. */
function wanted({ laplace }: Family, phi: number): [low: number, high: number] {
  if (phi > 0) return [0.88, 1]
  return laplace ? [0.92, 0.98] : [0.93, 0.97]
}

function seedsOf({ laplace }: Family, phi: number): number {
  const seeds = phi > 0 ? (laplace ? 100 : 500) : laplace ? 500 : 2000
  return Math.max(1, Math.round(seeds / shorter))
}

function report(family: Family, phi: number): void {
  const seeds = seedsOf(family, phi)
  const [low, high] = wanted(family, phi)
  const noise = phi > 0 ? `AR(1) noise of ${phi}` : 'white noise'
  for (const [quantity, value] of Object.entries(coverage(family, seeds, phi))) {
    const metric = `95 % intervals of ${quantity} that hold the truth, ${family.id}, ${noise}, seeds 1 to ${seeds}`
    const reference = phi > 0 ? 'least share wanted' : 'nominal share'
    const referenceValue = phi > 0 ? low : 0.95
    console.log(
      JSON.stringify({
        bench: 'coverage',
        metric,
        value,
        unit: 'share',
        reference,
        referenceValue,
        ratio: value / referenceValue,
        wanted: [low, high],
        met: value >= low && value <= high,
      }),
    )
  }
}

for (const family of families(true)) for (const phi of [0, ...CORRELATED]) report(family, phi)
