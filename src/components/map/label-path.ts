import { resample, type PathStep, type ScreenPoint } from './screen-path.ts'

/** Distance between the places of letters, pixels. */
const STEP = 4
/** A name bends by this much at most over its length, radians. */
const MOST_BEND = 1.1
/** A stretch this far from the middle is as bad as one that bends by a radian. */
const FAR_PX = 700
/** Names keep this far from each other. */
const APART_PX = 34

export interface Window {
  left: number
  top: number
  right: number
  bottom: number
}

/** The path without its small wiggles, so that letters do not dance. */
function smoothed(points: readonly ScreenPoint[]): PathStep[] {
  const fine = resample(points, STEP)
  const reach = 8
  const soft = fine.map((_, i): ScreenPoint => {
    const near = fine.slice(Math.max(0, i - reach), i + reach + 1)
    return [
      near.reduce((sum, { x }) => sum + x, 0) / near.length,
      near.reduce((sum, { y }) => sum + y, 0) / near.length,
    ]
  })
  return resample(soft, STEP)
}

const turnTo = (a: number, b: number) => Math.atan2(Math.sin(b - a), Math.cos(b - a))

const bend = (steps: readonly PathStep[]) =>
  steps.reduce((sum, { angle }, i) => sum + (i === 0 ? 0 : Math.abs(turnTo(steps[i - 1]!.angle, angle))), 0)

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

/**
 * Where a name of this width fits along a path: the straightest stretch near the middle of the window, as steps from
 * the name's beginning to its end. Null where none is calm enough.
 */
export function calmStretch(
  points: readonly ScreenPoint[],
  width: number,
  { window, taken = [] }: { window: Window; taken?: readonly PathStep[] },
): PathStep[] | null {
  const steps = smoothed(points)
  const count = Math.ceil(width / STEP)
  const inside = ({ x, y }: PathStep) => x > window.left && x < window.right && y > window.top && y < window.bottom
  const middle = { x: (window.left + window.right) / 2, y: (window.top + window.bottom) / 2 }
  let best: { stretch: PathStep[]; score: number } | null = null
  for (let i = 0; i + count <= steps.length; i += 4) {
    const stretch = steps.slice(i, i + count)
    if (!inside(stretch[0]!) || !inside(stretch.at(-1)!)) continue
    const bent = bend(stretch)
    const centre = stretch[count >> 1]!
    const score = bent + Math.hypot(centre.x - middle.x, centre.y - middle.y) / FAR_PX
    if (bent > MOST_BEND || (best !== null && score >= best.score) || meets(stretch, taken)) continue
    best = { stretch, score }
  }
  return best && upright(best.stretch)
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
