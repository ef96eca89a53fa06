import { formatElapsed } from '#shared/quantities/elapsed.ts'
import { formatNumber } from '#shared/quantities/format.ts'
import { checklistText } from './checklist-form.ts'
import { kindWords } from './test-facts.ts'
import type { TestForm } from './test-form.ts'
import {
  aquiferWords,
  distanceWords,
  intervalWords,
  precisionWords,
  thicknessWords,
  visibilityWords,
} from './test-words.ts'

const number = (value: number | null) => (value === null ? '–' : formatNumber(value, { figures: 4, trim: true }))
const metres = (value: number | null) => (value === null ? '–' : `${number(value)} m`)
const count = (many: readonly unknown[]) => String(many.length)

/** Label and text of each field of a test, for telling two versions of it apart. */
export const formShow: { [Key in keyof TestForm]: [label: string, text: (value: TestForm[Key]) => string] } = {
  kind: ['Kind of test', (kind) => kindWords[kind]],
  wellId: ['Pumped well', (id) => `number ${id ?? '–'}`],
  precision: ['Start is known as', (precision) => precisionWords[precision]],
  date: ['Date', String],
  time: ['Pump on at', String],
  year: ['Year', String],
  zone: ['Time zone', String],
  aquifer: ['Aquifer', (kind) => aquiferWords[kind]],
  intervalBasis: ['Tested interval', (basis) => intervalWords[basis]],
  intervalTopM: ['Top of the interval', metres],
  intervalBottomM: ['Bottom of the interval', metres],
  units: ['Aquifer units', (units) => units.map(({ share }) => number(share)).join(', ')],
  thicknessM: ['Thickness', metres],
  thicknessBasis: ['The thickness is that of', (basis) => thicknessWords[basis]],
  thicknessError: ['Error of the thickness', number],
  rateError: ['Error of the rate', number],
  rateSteps: [
    'Rates',
    (steps) =>
      steps
        .map(({ startS, value, unit }) => `${formatElapsed(startS ?? 0)}: ${number(value)} ${unit ?? ''}`)
        .join('; '),
  ],
  observationWells: [
    'Observation wells',
    (wells) =>
      `${count(wells)}: ${wells.map(({ distanceBasis, distanceM }) => `${distanceWords[distanceBasis]} ${metres(distanceM)}`).join('; ')}`,
  ],
  staticLevelM: ['Static level in the pumped well', metres],
  checklist: ['Conditions', checklistText],
  conditions: ['Notes', String],
  slug: [
    'Slug test',
    ({ casingRadiusM, screenLengthM, screenTopM, repeats }) =>
      `casing ${metres(casingRadiusM)}, screen ${metres(screenLengthM)} long from ${metres(screenTopM)}, first displacements ${repeats.map(({ initialM }) => metres(initialM)).join(', ') || '–'}`,
  ],
  capacity: [
    'Rate and drawdown',
    ({ rate, unit, durationS, drawdownM }) =>
      `${number(rate)} ${unit ?? ''}, ${metres(drawdownM)} after ${formatElapsed(durationS ?? 0)}`,
  ],
  visibility: ['Who may see it', (who) => visibilityWords[who]],
}

export const formFields = Object.keys(formShow) as (keyof TestForm)[]
