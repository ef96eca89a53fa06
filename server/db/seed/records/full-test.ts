import { distanceBetween } from '../island/lines.ts'
import type { Point } from '../island/frame.ts'
import type { Draws } from '../random.ts'
import { draws } from '../random.ts'
import { makeChecklist, type TestedSite } from './checklist.ts'
import { drawdownCurve, imagesOf, type Observed } from './drawdown.ts'
import { region } from './geography.ts'
import { groundUnder } from './ground.ts'
import { levelNoise } from './level-noise.ts'
import { writeLog, type FormatName } from './log-files.ts'
import { spoiled } from './log-faults.ts'
import { openPart } from './open-part.ts'
import type { PlannedTest } from './plan.ts'
import { planAnalyses, type Known } from './planned-analyses.ts'
import type { Recorder } from './reading-times.ts'
import { readingTimes } from './reading-times.ts'
import { settingOf } from './reported.ts'
import type { Design } from './test-design.ts'
import type { DemoFullTest, DemoOutcome, DemoSeries, DemoWell } from './types.ts'

/** A well that takes part in a test: the pumped one first. */
export interface Participant {
  well: DemoWell
  at: Point
}

const round = (value: number, decimals: number) => Number(value.toFixed(decimals))

/** Older tests were dipped by hand and typed in; loggers came later. */
function chooseRecording(stream: Draws, year: number): { recorder: Recorder; format: FormatName } {
  if (year > 2004 && stream.chance(0.6)) return { recorder: 'logger', format: 'logger' }
  const format = stream.pick(['fieldSheet', 'fieldSheet', 'centimetres', 'drawdowns', 'feet'] as const)
  return { recorder: 'hand', format }
}

interface Recording extends Known {
  startLocal: string
  recorder: Recorder
  format: FormatName
  seed: number
}

/** Where a participant sees the test from; in the gravels it matters how deep the wells are open. */
function observedBy({ design, site }: PlannedTest, pumped: Participant, date: string): Known['observed'] {
  const open = ({ well }: Participant) => (site.unit === 'TG' ? openPart(well, design.thickness, date) : null)
  return (participant, isPumped): Observed => ({
    place: participant.at,
    pumped: isPumped,
    pumpedScreen: open(pumped),
    screen: open(participant),
  })
}

function record(recording: Recording, participant: Participant, pumped: boolean): DemoSeries {
  const { test, ground, images, observed, startLocal, recorder, format, seed } = recording
  const { well } = participant
  const stream = draws(seed, `log/${well.code}/${startLocal}`)
  const times = readingTimes(recorder, test.design.pumping_s, test.design.recovery_s)
  const noise = levelNoise(stream, recorder, times)
  const drawdown = drawdownCurve(test.design, ground, images, observed(participant, pumped))
  const readings = times.map((time_s, i) => ({
    time_s,
    depth_m: well.staticDepthM + drawdown(time_s) + noise[i]!,
  }))
  // The crew looks after the pumped well; trouble is with loggers left alone.
  const kept = pumped ? readings : spoiled(stream, test.faults, readings)
  const log = writeLog(format, kept, { wellCode: well.code, startLocal, staticDepth_m: well.staticDepthM })
  const fileName = `${well.code}_${startLocal.slice(0, 10)}.${log.extension}`
  return { wellCode: well.code, fileName, text: log.text, mapping: log.mapping }
}

function describe({ faults }: PlannedTest, images: Known['images'], at: Point): string | null {
  const parts = [
    ...images.map((image) => {
      const metres = Math.round(distanceBetween(at, image.at) / 2)
      return image.kind === 'stream'
        ? `A connected stream runs ${metres} m away.`
        : `The Kelder Fault is ${metres} m away.`
    }),
    ...(faults.includes('short') ? ['The pump failed after 40 minutes.'] : []),
    ...(faults.includes('drift') ? ['The loggers were not checked against dips.'] : []),
    ...(faults.includes('gap') ? ['A logger lost part of its memory.'] : []),
  ]
  return parts.length > 0 ? parts.join(' ') : null
}

function testedSite({ design, site, year }: PlannedTest, images: Known['images']): TestedSite {
  const streams = images.filter(({ kind }) => kind === 'stream').map((image) => distanceBetween(site.at, image.at) / 2)
  const nearest = streams.length > 0 ? Math.min(...streams) : null
  return { year, streamM: nearest, rate_m3_s: design.rate.m3s }
}

const RATIONALES: Record<DemoOutcome, string> = {
  adopted: 'Curve of the observation wells; the other analyses of the test agree.',
  submitted: 'Joint fit of the observation wells, boundary effects left out by the window.',
  returned: 'Joint fit of the observation wells.',
  draft: 'First look at the readings.',
}

function rateStepsOf({ rate, pumping_s }: Design): DemoFullTest['rateSteps'] {
  const { value, unit } = rate
  return [
    { startS: 0, rate: { value, unit } },
    { startS: pumping_s, rate: { value: 0, unit } },
  ]
}

/** A constant-rate test with its log files, as crews would have handed them in. */
export function makeFullTest(
  seed: number,
  test: PlannedTest,
  index: number,
  participants: Participant[],
): DemoFullTest {
  const [pumped, ...observers] = participants as [Participant, ...Participant[]]
  const { site, design, year } = test
  const stream = draws(seed, `test/${index}`)
  const day = `${String(stream.whole(1, 12)).padStart(2, '0')}-${String(stream.whole(1, 28)).padStart(2, '0')}`
  const startLocal = `${year}-${day}T${String(stream.whole(7, 11)).padStart(2, '0')}:00`
  const recording: Recording = {
    ...{ test, startLocal, seed, ...chooseRecording(stream, year) },
    ground: groundUnder(design, draws(seed, `ground/${index}`)),
    images: imagesOf(design),
    observed: observedBy(test, pumped, startLocal),
  }
  const analyses = planAnalyses(recording, participants)
  // A boundary so near that no curve holds leaves a test without a value.
  const outcome = analyses.length > 0 ? test.outcome : 'draft'
  return {
    kind: 'constant-rate',
    wellCode: pumped.well.code,
    unit: site.unit,
    aquifer: settingOf(site.unit),
    startLocal,
    zone: region.zone,
    thicknessM: round(design.thickness, 1),
    thicknessBasis: site.unit === 'TG' ? 'saturated' : 'aquifer',
    rateSteps: rateStepsOf(design),
    staticLevelM: pumped.well.staticDepthM,
    observationWells: observers.map(({ well, at }) => ({
      wellCode: well.code,
      distanceM: round(distanceBetween(site.at, at), 1),
      staticLevelM: well.staticDepthM,
    })),
    series: participants.map((participant, i) => record(recording, participant, i === 0)),
    faults: test.faults,
    analyses,
    outcome,
    rationale: RATIONALES[outcome],
    conditions: describe(test, recording.images, site.at),
    checklist: makeChecklist(draws(seed, `checklist/${index}`), testedSite(test, recording.images)),
    visibility: pumped.well.visibility,
    embargoUntil: pumped.well.embargoUntil,
  }
}
