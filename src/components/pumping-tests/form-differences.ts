import { formatElapsed } from '#shared/quantities/elapsed.ts'
import { formatNumber, formatQuantity } from '#shared/quantities/format.ts'
import type { UnitSystem } from '#shared/quantities/systems.ts'
import { checklistText } from './checklist-form.ts'
import { kindWords } from './test-facts.ts'
import { emptyForm, type TestForm } from './test-form.ts'
import {
  aquiferWords,
  distanceWords,
  intervalWords,
  precisionWords,
  thicknessWords,
  visibilityWords,
} from './test-words.ts'

/** In whose units a form is told, and what its wells and aquifer units are called. */
export interface FormReader {
  units: UnitSystem
  wellName: (id: number) => string
  unitName: (id: number) => string
}

const NOTHING = '–'
const number = (value: number | null) => (value === null ? NOTHING : formatNumber(value, { figures: 4, trim: true }))
const named = (id: number | null, name: (id: number) => string) => (id === null ? NOTHING : name(id))

type FormShow = { [Key in keyof TestForm]: [label: string, text: (value: TestForm[Key]) => string] }

/** Label and text of each field of a test, for telling two versions of it apart. */
export function formShow({ units, wellName, unitName }: FormReader): FormShow {
  const length = (value: number | null) =>
    value === null ? NOTHING : formatQuantity(value, units.length, { figures: 4, trim: true })
  return {
    kind: ['Kind of test', (kind) => kindWords[kind]],
    wellId: ['Pumped well', (id) => named(id, wellName)],
    precision: ['Start is known as', (precision) => precisionWords[precision]],
    date: ['Date', String],
    time: ['Pump on at', String],
    year: ['Year', String],
    zone: ['Time zone', String],
    aquifer: ['Aquifer', (kind) => aquiferWords[kind]],
    intervalBasis: ['Tested interval', (basis) => intervalWords[basis]],
    intervalTopM: ['Top of the interval', length],
    intervalBottomM: ['Bottom of the interval', length],
    units: [
      'Aquifer units',
      (shares) => shares.map(({ unitId, share }) => `${named(unitId, unitName)} ${number(share)}`).join(', '),
    ],
    thicknessM: ['Thickness', length],
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
        wells
          .map(
            ({ wellId, distanceBasis, distanceM }) =>
              `${named(wellId, wellName)}, ${distanceWords[distanceBasis].toLowerCase()}${distanceM === null ? '' : ` ${length(distanceM)}`}`,
          )
          .join('; ') || NOTHING,
    ],
    staticLevelM: ['Static level in the pumped well', length],
    checklist: ['Conditions', (checklist) => checklistText(checklist, units)],
    conditions: ['Notes', String],
    slug: [
      'Slug test',
      ({ casingRadiusM, screenLengthM, screenTopM, repeats }) =>
        `casing ${length(casingRadiusM)}, screen ${length(screenLengthM)} long from ${length(screenTopM)}, first displacements ${repeats.map(({ initialM }) => length(initialM)).join(', ') || NOTHING}`,
    ],
    capacity: [
      'Rate and drawdown',
      ({ rate, unit, durationS, drawdownM }) =>
        `${number(rate)} ${unit ?? ''}, ${length(drawdownM)} after ${formatElapsed(durationS ?? 0)}`,
    ],
    visibility: ['Who may see it', (who) => visibilityWords[who]],
  }
}

export const formFields = Object.keys(emptyForm('', '')) as (keyof TestForm)[]
