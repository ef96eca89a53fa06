import { curveOwn, methodsOf, type OwnInputs, type OwnKindId, type OwnOptions } from '#shared/hydraulics/any-kind.ts'
import type { KindResult } from '#shared/hydraulics/kinds.ts'
import type { SlugInputs, SlugOptions } from '#shared/hydraulics/slug/slug-test.ts'
import type {
  SpecificCapacityInputs,
  SpecificCapacityOptions,
} from '#shared/hydraulics/specific-capacity/specific-capacity-test.ts'
import type { StepInputs } from '#shared/hydraulics/step/step-test.ts'
import { capacityPlot } from './capacity-plot.ts'
import type { SimplePlot } from './simple-plot.ts'
import { slugPlot } from './slug-plot.ts'
import { perRatePlot, stepTimePlot } from './step-plot.ts'

export type KindPlotId = 'head-log' | 'head-linear' | 'per-rate' | 'step-time' | 'storage'

/** Units in which these plots are drawn. */
export interface KindPlotUnits {
  time: string
  length: string
  discharge: string
  transmissivity: string
}

/** An analysis of a test of a kind of its own, with what it found. */
export interface KindFit {
  method: string
  options: OwnOptions
  result: KindResult | null
}

export interface KindPlotRequest {
  inputs: OwnInputs
  /** Null before there is an analysis. */
  fit: KindFit | null
  units: KindPlotUnits
  direction: 'down' | 'up'
}

interface KindPlot {
  id: KindPlotId
  title: string
  make: (request: KindPlotRequest) => SimplePlot
}

/** Fitted values at times, on the present inputs. */
const curveOf =
  (kind: OwnKindId, { inputs, fit }: KindPlotRequest) =>
  (times_s: number[]) =>
    fit?.result ? curveOwn(kind, { ...fit, inputs, result: fit.result }, times_s) : []

/** Between which heads a line is drawn: those of the method until somebody says others; null where there is no line. */
export function headsOf(fit: Pick<KindFit, 'method' | 'options'> | null): { from: number; to: number } | null {
  const spec = fit && methodsOf('slug')[fit.method]?.options.find((option) => option.kind === 'heads')
  if (spec?.kind !== 'heads') return null
  return (fit?.options as SlugOptions).heads ?? spec.default
}

const slug = (id: 'head-log' | 'head-linear', title: string): KindPlot => ({
  id,
  title,
  make: (request) =>
    slugPlot({
      kind: id,
      inputs: request.inputs as SlugInputs,
      repeatIds: (request.fit?.options as SlugOptions | undefined)?.repeatIds ?? null,
      heads: headsOf(request.fit),
      outcome: request.fit?.result ?? null,
      curve: curveOf('slug', request),
      // A slug test lasts seconds to minutes, in whatever unit pumping tests are read.
      timeUnit: 's',
    }),
})

/** The plots of each kind, the telling one first. */
export const kindPlots: Record<OwnKindId, readonly KindPlot[]> = {
  slug: [slug('head-log', 'Logarithmic'), slug('head-linear', 'Linear')],
  step: [
    { id: 'per-rate', title: 's/Q and Q', make: ({ fit, units }) => perRatePlot(fit?.result ?? null, units) },
    {
      id: 'step-time',
      title: 'Time',
      make: (request) =>
        stepTimePlot({ ...request, inputs: request.inputs as StepInputs, curve: curveOf('step', request) }),
    },
  ],
  'specific-capacity': [
    {
      id: 'storage',
      title: 'Storativity',
      make: ({ inputs, fit, units }) =>
        capacityPlot({
          inputs: inputs as SpecificCapacityInputs,
          options: (fit?.options ?? {}) as SpecificCapacityOptions,
          T: fit?.result?.T?.value ?? null,
          unit: units.transmissivity,
        }),
    },
  ],
}

/** Levels that swing have no logarithm. */
const swinging = new Set(['slug-oscillating', 'slug-near-critical'])

/** The plot that an analysis is judged by. */
export const firstKindPlot = (kind: OwnKindId, method: string | null): KindPlotId =>
  method !== null && swinging.has(method) ? 'head-linear' : (kindPlots[kind][0] as KindPlot).id

/** @throws RangeError for a plot that the kind lacks */
export function kindPlot(kind: OwnKindId, id: KindPlotId, request: KindPlotRequest): SimplePlot {
  const found = kindPlots[kind].find((plot) => plot.id === id)
  if (!found) throw new RangeError(`Tests of kind ${kind} have no plot ${id}`)
  return found.make(request)
}
