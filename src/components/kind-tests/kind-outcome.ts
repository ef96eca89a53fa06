import type { Analysis, KindWorkbenchInputs } from '#shared/contracts/analyses.ts'
import {
  isOwnKind,
  kindOfMethod,
  methodsOf,
  type OwnKindId,
  type OwnMethod,
  type OwnOptions,
} from '#shared/hydraulics/any-kind.ts'
import type { KindResult } from '#shared/hydraulics/kinds.ts'
import type { SlugInputs } from '#shared/hydraulics/slug/slug-test.ts'

export type OwnAnalysis = Analysis & { options: OwnOptions; result: KindResult }

/** Analyses of tests of a kind of their own carry their options. */
export const isOwn = (analysis: Analysis): analysis is OwnAnalysis =>
  isOwnKind(kindOfMethod(analysis.method)) && analysis.options !== null

/** @throws Error for a method that the kind does not have */
export function methodOf(kind: OwnKindId, id: string): OwnMethod {
  const method = methodsOf(kind)[id]
  if (!method) throw new Error(`${kind} has no method ${id}`)
  return method
}

/** A level that swings this far beyond rest, of its first displacement, is a matter of inertia. */
const SWING = 0.1
const swings = ({ repeats }: SlugInputs) =>
  repeats.some(({ displacement_m, initial_m }) => displacement_m.some((value) => value / initial_m < -SWING))

/** The method that a new analysis begins with: the one whose conditions the test seems to meet. */
export function firstMethod({ kind, inputs }: KindWorkbenchInputs): string {
  if (kind !== 'slug') return Object.keys(methodsOf(kind))[0] as string
  if (swings(inputs)) return 'slug-oscillating'
  return inputs.aquifer === 'unconfined' && inputs.thickness_m !== null ? 'bouwer-rice' : 'hvorslev'
}

export const firstKindOptions = (kind: OwnKindId): OwnOptions => (kind === 'slug' ? { repeatIds: null } : {})

/** Whether there is anything to analyse. */
export function isAnalysable({ kind, inputs }: KindWorkbenchInputs): boolean {
  if (kind === 'slug') return inputs.repeats.length > 0
  return kind === 'step' ? inputs.well.elapsed_s.length > 0 : true
}
