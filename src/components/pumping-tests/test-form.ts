import type { PumpingTest, PumpingTestInput } from '#shared/contracts/pumping-tests.ts'
import { emptyChecklist, type TestChecklist } from '#shared/contracts/test-checklist.ts'
import type { TestDetails } from '#shared/contracts/test-details.ts'
import type { Well } from '#shared/contracts/wells.ts'
import {
  capacityDetailsOf,
  capacityFormOf,
  capacitySteps,
  capacitySuggestions,
  emptyCapacity,
  type CapacityForm,
} from '../specific-capacity-tests/capacity-form.ts'
import { emptySlug, slugDetailsOf, slugFormOf, slugSuggestions, type SlugForm } from '../slug-tests/slug-form.ts'
import { checklistFormOf, checklistOf } from './checklist-form.ts'

type Input = PumpingTestInput
export type Precision = PumpingTest['startPrecision']
/** Kinds of test that are entered with a form. */
export type FormKind = Exclude<PumpingTest['kind'], 'reported'>

export interface StepForm {
  startS: number | null
  value: number | null
  unit: string | null
}

export interface ObservationForm {
  wellId: number | null
  distanceBasis: Input['observationWells'][number]['distanceBasis']
  distanceM: number | null
  reason: string
  staticLevelM: number | null
}

export interface ShareForm {
  unitId: number | null
  share: number | null
  basis: Input['units'][number]['basis']
}

/** A test as it is typed: what is not yet known is null. */
export interface TestForm extends Pick<
  Input,
  'zone' | 'aquifer' | 'intervalBasis' | 'thicknessBasis' | 'visibility' | 'intervalTopM' | 'intervalBottomM'
> {
  kind: FormKind
  wellId: number | null
  precision: Precision
  date: string
  time: string
  year: string
  units: ShareForm[]
  thicknessM: number | null
  thicknessError: number | null
  rateError: number | null
  rateSteps: StepForm[]
  observationWells: ObservationForm[]
  staticLevelM: number | null
  checklist: TestChecklist
  conditions: string
  slug: SlugForm
  capacity: CapacityForm
}

export const emptyForm = (zone: string, dischargeUnit: string): TestForm => ({
  kind: 'constant-rate',
  wellId: null,
  precision: 'instant',
  date: '',
  time: '',
  year: '',
  zone,
  aquifer: 'confined',
  intervalBasis: 'screens',
  intervalTopM: null,
  intervalBottomM: null,
  units: [{ unitId: null, share: 1, basis: 'single-unit' }],
  thicknessM: null,
  thicknessBasis: 'aquifer',
  thicknessError: 0.1,
  rateError: 0.05,
  rateSteps: [{ startS: 0, value: null, unit: dischargeUnit }],
  observationWells: [],
  staticLevelM: null,
  checklist: emptyChecklist(),
  conditions: '',
  visibility: 'internal',
  slug: emptySlug(),
  capacity: emptyCapacity(dischargeUnit),
})

/** What the kind needs, of all that was typed. */
const detailsOf: Record<FormKind, (form: TestForm) => TestDetails | null> = {
  'constant-rate': () => null,
  step: () => ({ version: 1, kind: 'step' }),
  slug: ({ slug }) => slugDetailsOf(slug),
  'specific-capacity': ({ capacity }) => capacityDetailsOf(capacity),
}

const stepsOf = ({ rateSteps }: TestForm) =>
  rateSteps.map(({ startS, value, unit }) => ({ startS, rate: { value, unit } })) as Input['rateSteps']

/** Rates as the kind has them. */
const ratesOf: Record<FormKind, (form: TestForm) => Input['rateSteps']> = {
  'constant-rate': stepsOf,
  step: stepsOf,
  slug: () => [],
  'specific-capacity': ({ capacity }) => capacitySteps(capacity),
}

const starts: Record<Precision, (form: TestForm) => string> = {
  instant: ({ date, time }) => `${date}T${time}`,
  day: ({ date }) => date,
  year: ({ year }) => year,
}

/** Whether the tested interval is typed; otherwise it follows from the well, and its fields are not on the page. */
export const typesInterval = ({ intervalBasis }: Pick<TestForm, 'intervalBasis'>): boolean =>
  intervalBasis === 'packers' || intervalBasis === 'open-hole'

/**
 * What is sent. Fields left empty go as null, so that the server names every one of them at once, each under its own
 * path; the types say otherwise only until it has answered.
 */
export function inputOf(form: TestForm): Input {
  const { precision: _p, date: _d, time: _t, year: _y, kind, slug: _s, capacity: _c, ...typed } = form
  const { checklist, conditions, units, rateSteps: _r, observationWells, ...rest } = typed
  return {
    ...rest,
    ...(typesInterval(form) ? {} : { intervalTopM: null, intervalBottomM: null }),
    startLocal: starts[form.precision](form),
    units: units.length === 1 ? [{ ...units[0], share: 1 }] : units,
    rateSteps: ratesOf[kind](form),
    details: detailsOf[kind](form),
    observationWells: (kind === 'constant-rate' ? observationWells : []).map(({ reason, ...well }) => ({
      ...well,
      distanceM: well.distanceBasis === 'map' ? null : well.distanceM,
      reason: reason.trim() || null,
    })),
    checklist: checklistOf(checklist),
    conditions: conditions.trim() || null,
  } as Input
}

function startOf({ startLocal, startPrecision }: PumpingTest) {
  return {
    precision: startPrecision,
    date: startPrecision === 'year' ? '' : startLocal.slice(0, 10),
    time: startLocal.slice(11, 19).replace(/:00$/, ''),
    year: startLocal.slice(0, 4),
  }
}

/** A saved test, to be changed. */
export function formOf(test: PumpingTest): TestForm {
  const { zone, aquifer, intervalBasis, intervalTopM, intervalBottomM, wellId } = test
  const { thicknessM, thicknessBasis, thicknessError, rateError, visibility, details } = test
  const fresh = emptyForm(zone, test.rateSteps[0]?.enteredUnit ?? 'L/s')
  return {
    kind: details?.kind ?? 'constant-rate',
    ...{ wellId, zone, aquifer, intervalBasis, intervalTopM, intervalBottomM },
    ...{ thicknessM, thicknessBasis, thicknessError, rateError, visibility },
    ...startOf(test),
    units: test.units.map(({ unitId, share, basis }) => ({ unitId, share, basis })),
    rateSteps: test.rateSteps.map(({ startS, enteredValue, enteredUnit }) => ({
      startS,
      value: enteredValue,
      unit: enteredUnit,
    })),
    observationWells: test.wells
      .filter(({ role }) => role === 'observation')
      .map((well) => ({
        wellId: well.wellId,
        distanceBasis: well.distanceBasis,
        distanceM: well.distanceM,
        reason: well.distanceReason ?? '',
        staticLevelM: well.staticLevelM,
      })),
    staticLevelM: test.wells.find(({ role }) => role === 'pumped')?.staticLevelM ?? null,
    checklist: checklistFormOf(test.checklist),
    conditions: test.conditions ?? '',
    slug:
      details?.kind === 'slug'
        ? slugFormOf(
            details,
            test.series.map(({ id }) => id),
          )
        : fresh.slug,
    capacity: details?.kind === 'specific-capacity' ? capacityFormOf(details, test.rateSteps) : fresh.capacity,
  }
}

/** Fields that a pumped well may say something about. */
const suggestible = [
  'intervalBasis',
  'visibility',
  'units',
  'thicknessM',
  'thicknessBasis',
  'aquifer',
  'slug',
  'capacity',
] as const
type Suggested = Pick<TestForm, (typeof suggestible)[number]>

/**
 * Fills in what a well suggests. What somebody chose stays; what another well suggested before goes with that well, so
 * that no thickness of one well stands in the test of another. `before` is what the form was given before this.
 */
export function suggest(form: TestForm, before: Suggested, suggestions: Partial<TestForm>): Suggested {
  const fresh = emptyForm(form.zone, form.capacity.unit ?? '')
  const next = Object.fromEntries(suggestible.map((field) => [field, suggestions[field] ?? fresh[field]])) as unknown
  const given = next as Suggested
  const same = (field: keyof Suggested) => JSON.stringify(form[field]) === JSON.stringify(before[field])
  const open = suggestible.filter(same).map((field) => [field, structuredClone(given[field])])
  Object.assign(form, Object.fromEntries(open))
  return given
}

const kinds = ['confined', 'leaky', 'unconfined'] as const
const isAquifer = (kind: string): kind is TestForm['aquifer'] => (kinds as readonly string[]).includes(kind)

export interface UnitFacts {
  id: number
  kind: string
}

/**
 * What the pumped well suggests: the unit that its screens are open to, that unit's thickness and kind, who may see it.
 * A test of a published well is published by a steward.
 */
export function suggestionsOf(
  well: Well,
  units: readonly UnitFacts[],
  mayPublish: boolean,
  unit = '',
): Partial<TestForm> {
  const top = Math.min(...well.screens.map(({ topM }) => topM))
  const bottom = Math.max(...well.screens.map(({ bottomM }) => bottomM))
  const open = well.picks.find(
    (pick) =>
      pick.topM < bottom &&
      (pick.bottomM ?? Infinity) > top &&
      units.some(({ id, kind }) => id === pick.unitId && isAquifer(kind)),
  )
  const kind = units.find(({ id }) => id === open?.unitId)?.kind
  return {
    slug: slugSuggestions(well),
    capacity: capacitySuggestions(well, unit),
    intervalBasis: well.screens.length > 0 ? 'screens' : 'unknown',
    visibility: well.visibility === 'published' && !mayPublish ? 'internal' : well.visibility,
    ...(open ? { units: [{ unitId: open.unitId, share: 1, basis: 'single-unit' as const }] } : {}),
    ...(open?.bottomM != null ? { thicknessM: open.bottomM - open.topM, thicknessBasis: 'aquifer' as const } : {}),
    ...(kind && isAquifer(kind) ? { aquifer: kind } : {}),
  }
}
