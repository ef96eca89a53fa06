import { solveSymmetric } from '#shared/numerics/small-matrix.ts'
import type { Finding } from '../analysis.ts'
import { levelInScreen } from './effective-radius.ts'
import type { Heads, SlugInputs } from './slug-test.ts'

/** Heads between which the shape of the plot is judged: before, the level still swings; after, noise rules. */
const JUDGED = { from: 0.05, to: 0.98 }
const FEWEST_READINGS = 9
const FEWEST_ON_A_LINE = 3
/** More readings than this add nothing to the shape. */
const MOST_READINGS = 120
/** The bend must explain this share of the squares about one line, and the slopes differ by this factor. */
const BEND = { explained: 0.8, ratio: 1.5 }

export interface Bend {
  kind: 'two-lines' | 'curved'
  /** Rate of fall of ln(H/H0) before the bend over that after it. */
  ratio: number
  /** Normalised head at the bend. */
  head: number
  time_s: number
}

/**
 * Looks for a bend of ln(H/H0) against time that steepens no more: two straight parts, as when a filter pack drains
 * first, or a smooth curve, as when water is stored in the aquifer. Whichever of a broken line and a smooth curve
 * leaves fewer squares is named.
 */
export function bendOf({ time_s, head }: Heads): Bend | null {
  const all = time_s.flatMap((time, i) => {
    const value = head[i] as number
    return value >= JUDGED.from && value <= JUDGED.to ? [{ time, y: -Math.log(value) }] : []
  })
  const stride = Math.ceil(all.length / MOST_READINGS)
  const points = all.filter((_, i) => i % stride === 0)
  if (points.length < FEWEST_READINGS) return null
  const last = points.at(-1)?.time as number
  const t = points.map(({ time }) => time / last)
  const y = points.map(({ y: value }) => value)
  const single = leastSquares(
    t.map((value) => [1, value]),
    y,
  )
  // As many coefficients as the broken line has, the place of its break among them.
  const curved = leastSquares(
    t.map((value) => [1, Math.sqrt(value), value, value * value]),
    y,
  )
  const broken = bestBreak(t, y)
  if (!single || !broken) return null
  const squares = Math.min(broken.squares, curved?.squares ?? Infinity)
  if (squares > (1 - BEND.explained) * single.squares || !(broken.ratio >= BEND.ratio)) return null
  return {
    kind: broken.squares <= (curved?.squares ?? Infinity) ? 'two-lines' : 'curved',
    ratio: broken.ratio,
    head: Math.exp(-broken.height),
    time_s: broken.at * last,
  }
}

function bestBreak(t: number[], y: number[]) {
  const breaks = t.slice(FEWEST_ON_A_LINE - 1, t.length - FEWEST_ON_A_LINE + 1)
  const fits = breaks.flatMap((at) => {
    const fit = leastSquares(
      t.map((value) => [1, value, Math.max(0, value - at)]),
      y,
    )
    if (!fit) return []
    const [height = 0, early = 0, change = 0] = fit.coefficients
    return [{ at, squares: fit.squares, ratio: early / (early + change), height: height + early * at }]
  })
  return fits.length === 0 ? null : fits.reduce((best, fit) => (fit.squares < best.squares ? fit : best))
}

function leastSquares(rows: number[][], y: number[]) {
  const size = rows[0]?.length ?? 0
  const normal = Array.from({ length: size }, (_, i) =>
    Array.from({ length: size }, (__, j) =>
      rows.reduce((sum, row) => sum + (row[i] as number) * (row[j] as number), 0),
    ),
  )
  const right = normal.map((_, i) => rows.reduce((sum, row, k) => sum + (row[i] as number) * (y[k] as number), 0))
  const coefficients = solveSymmetric(normal, right)
  if (!coefficients) return null
  const squares = rows.reduce((sum, row, k) => {
    const model = row.reduce((part, value, i) => part + value * (coefficients[i] as number), 0)
    return sum + ((y[k] as number) - model) ** 2
  }, 0)
  return { coefficients, squares }
}

/** The bend in words: a draining filter pack, two parts without that reason, or storage in the aquifer. */
export function bendFindings(heads: Heads, inputs: SlugInputs): Finding[] {
  const bend = bendOf(heads)
  if (!bend) return []
  const params = { repeat: heads.repeat.label, ratio: bend.ratio, head: bend.head, time_s: bend.time_s }
  if (bend.kind === 'curved') return [{ code: 'heads-curved', severity: 'note', params }]
  return levelInScreen(inputs)
    ? [{ code: 'double-straight-line', severity: 'caution', params }]
    : [{ code: 'double-straight-line-unexplained', severity: 'caution', params }]
}
