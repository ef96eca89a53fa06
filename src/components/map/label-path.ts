import { resample, visibleRuns, type Box, type PathStep, type ScreenPoint } from './screen-path.ts'

/** Distance between the places of letters, pixels. */
const STEP = 4
/** A name bends by this much at most over its length, radians. */
const MOST_BEND = 1.1
/** A stretch this far from the middle is as bad as one that bends by a radian. */
const FAR_PX = 700
/** Names keep this far from each other. */
const APART_PX = 34
/** Steps to either side over which wiggles are smoothed. */
const REACH = 8

/** Sums of all that came before: the sum of any stretch is then one subtraction. */
function runningSums(values: readonly number[]): number[] {
  const sums = [0]
  for (const value of values) sums.push(sums.at(-1)! + value)
  return sums
}

/** The path without its small wiggles, so that letters do not dance. */
function smoothed(points: readonly ScreenPoint[]): PathStep[] {
  const fine = resample(points, STEP)
  const [xs, ys] = [runningSums(fine.map(({ x }) => x)), runningSums(fine.map(({ y }) => y))]
  const soft = fine.map((_, i): ScreenPoint => {
    const [from, to] = [Math.max(0, i - REACH), Math.min(fine.length, i + REACH + 1)]
    return [(xs[to]! - xs[from]!) / (to - from), (ys[to]! - ys[from]!) / (to - from)]
  })
  return resample(soft, STEP)
}

const turnTo = (a: number, b: number) => Math.atan2(Math.sin(b - a), Math.cos(b - a))

/** Whether a name would come too close to one that is written already. */
const meets = (stretch: readonly PathStep[], taken: readonly PathStep[]) =>
  stretch.some((a, i) => i % 5 === 0 && taken.some((b) => Math.hypot(a.x - b.x, a.y - b.y) < APART_PX))

/** Left to right, so that the name does not stand on its head. */
function upright(steps: PathStep[]): PathStep[] {
  const first = steps[0]!
  const last = steps.at(-1)!
  if (last.x >= first.x) return steps
  return [...steps].reverse().map(({ x, y, angle }) => ({ x, y, angle: angle + Math.PI }))
}

interface Candidate {
  stretch: PathStep[]
  score: number
}

/** All stretches of a run that bend little enough, each with how far it is from straight and central. */
function candidates(steps: readonly PathStep[], count: number, window: Box): Candidate[] {
  const bends = runningSums(steps.map(({ angle }, i) => (i === 0 ? 0 : Math.abs(turnTo(steps[i - 1]!.angle, angle)))))
  const middle = { x: (window.left + window.right) / 2, y: (window.top + window.bottom) / 2 }
  const inside = ({ x, y }: PathStep) => x > window.left && x < window.right && y > window.top && y < window.bottom
  const found: Candidate[] = []
  for (let i = 0; i + count <= steps.length; i += 4) {
    const bend = bends[i + count]! - bends[i + 1]!
    if (bend > MOST_BEND || !inside(steps[i]!) || !inside(steps[i + count - 1]!)) continue
    const { x, y } = steps[i + (count >> 1)]!
    const score = bend + Math.hypot(x - middle.x, y - middle.y) / FAR_PX
    found.push({ stretch: steps.slice(i, i + count), score })
  }
  return found
}

/**
 * Where a name of this width fits along a path: the straightest stretch near the middle of the window, as steps from
 * the name's beginning to its end. Null where none is calm enough.
 */
export function calmStretch(
  points: readonly ScreenPoint[],
  width: number,
  { window, taken = [] }: { window: Box; taken?: readonly PathStep[] },
): PathStep[] | null {
  const count = Math.ceil(width / STEP)
  const best = visibleRuns(points, window)
    .flatMap((run) => candidates(smoothed(run), count, window))
    .sort((a, b) => a.score - b.score)
    .find(({ stretch }) => !meets(stretch, taken))
  return best ? upright(best.stretch) : null
}

/** The place of a letter whose middle lies `along` pixels from the beginning of a stretch. */
export function letterPlace(stretch: readonly PathStep[], along: number): PathStep {
  const at = Math.min(stretch.length - 1, Math.max(0, along / STEP))
  const before = stretch[Math.floor(at)]!
  const after = stretch[Math.ceil(at)]!
  const share = at - Math.floor(at)
  return {
    x: before.x + share * (after.x - before.x),
    y: before.y + share * (after.y - before.y),
    angle: before.angle + share * turnTo(before.angle, after.angle),
  }
}
