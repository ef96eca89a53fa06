import type { KindWorkbenchInputs } from '#shared/contracts/analyses.ts'
import type { OwnOptions } from '#shared/hydraulics/any-kind.ts'
import type { KindResult, OwnKindId } from '#shared/hydraulics/kinds.ts'
import { repeatExtra } from '#shared/hydraulics/slug/repeats.ts'
import type { SlugInputs, SlugOptions } from '#shared/hydraulics/slug/slug-test.ts'
import { formatElapsed } from '#shared/quantities/elapsed.ts'
import { formatNumber } from '#shared/quantities/format.ts'
import type { Units } from '../../composables/useUnits.ts'

/** A single number of a result, said in words. */
export interface FactFound {
  name: string
  value: string
  note?: string
}

type Teller = (
  inputs: KindWorkbenchInputs['inputs'],
  options: OwnOptions,
  result: KindResult,
  units: Units,
) => FactFound[]

const percent = (share: number) => `${formatNumber(100 * share, { figures: 2 })} %`

/** K of each repeat beside its first displacement; one repeat has nothing to be compared with. */
const repeats: Teller = (inputs, options, { extras }, units) => {
  const { repeatIds } = options as SlugOptions
  const all = (inputs as SlugInputs).repeats
  const used = repeatIds === null ? all : repeatIds.flatMap((id) => all.find((repeat) => repeat.id === id) ?? [])
  if (used.length < 2) return []
  return used.flatMap(({ label }, i) => {
    const [K, initial] = [extras[repeatExtra('K_m_s', i)], extras[repeatExtra('initial_m', i)]]
    if (K === undefined) return []
    return [
      { name: label, value: units.quantity(K, 'conductivity'), note: `from ${units.quantity(initial, 'length')}` },
    ]
  })
}

const steps: Teller = (_inputs, _options, { extras }, units) => {
  const { predicted_rate_m3_s: rate, laminar_share_highest: share, increment_s } = extras
  const known: FactFound[] = [
    { name: 'Read after', value: formatElapsed(increment_s ?? 0), note: 'of each step' },
    ...(share === undefined
      ? []
      : [
          {
            name: 'Linear share',
            value: percent(share),
            note: `of the drawdown at ${units.quantity(extras.highest_rate_m3_s, 'discharge')}`,
          },
        ]),
  ]
  if (rate === undefined) return known
  const interval = units.interval(extras.predicted_low_m ?? 0, extras.predicted_high_m ?? 0, 'length')
  return [
    ...known,
    {
      name: `At ${units.quantity(rate, 'discharge')}`,
      value: units.quantity(extras.predicted_drawdown_m, 'length'),
      note: `drawdown, ${interval}; ${units.quantity(extras.predicted_specific_capacity_m2_s, 'specificCapacity')}`,
    },
  ]
}

const capacity: Teller = (_inputs, _options, { extras }, units) => [
  { name: 'Specific capacity', value: units.quantity(extras.specific_capacity_m2_s, 'specificCapacity') },
  {
    name: 'Drawdown of the aquifer',
    value: units.quantity(extras.formation_drawdown_m, 'length'),
    note: 'after well loss and thinning',
  },
  { name: 'Storativity assumed', value: formatNumber(extras.S ?? 0, { figures: 2 }) },
]

const tellers: Record<OwnKindId, Teller> = { slug: repeats, step: steps, 'specific-capacity': capacity }

/** What a result says beside its estimates, by the kind of test. */
export const factsFound = (
  { kind, inputs }: KindWorkbenchInputs,
  options: OwnOptions,
  result: KindResult,
  units: Units,
) => tellers[kind](inputs, options, result, units)
