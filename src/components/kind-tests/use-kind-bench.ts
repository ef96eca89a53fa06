import { computed, inject, provide, type ComputedRef, type InjectionKey } from 'vue'
import type { Analysis, KindWorkbenchInputs } from '#shared/contracts/analyses.ts'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import type { OwnMethod, OwnOptions } from '#shared/hydraulics/any-kind.ts'
import type { KindResult } from '#shared/hydraulics/kinds.ts'
import { provideBench, type Bench } from '../workbench/use-bench.ts'
import { kindWork, type KindWork } from './kept-kind-work.ts'
import { firstKindOptions, firstMethod, isAnalysable, isOwn, methodOf } from './kind-outcome.ts'

/** The workbench of a test of a kind of its own: beside what all kinds of test have, its method. */
export interface KindBench extends Omit<Bench<KindWork, KindResult, KindWorkbenchInputs>, 'setOptions'> {
  method: ComputedRef<OwnMethod | null>
  /** Options of one kind, which the form knows by their names. */
  setOptions(change: Record<string, unknown>): void
}

const key: InjectionKey<KindBench> = Symbol('kind-bench')

interface Given {
  test: () => PumpingTest
  snapshot: () => KindWorkbenchInputs
  analyses: () => readonly Analysis[]
  /** Opened by the address. */
  opened: () => number | null
}

function workOf(analysis: Analysis): KindWork | null {
  if (!isOwn(analysis)) return null
  const { method, options, label, rowVersion } = analysis
  return { method, options, label, rowVersion }
}

export function provideKindBench(given: Given): KindBench {
  const bench = provideBench<KindWork, KindResult, KindWorkbenchInputs>({
    ...given,
    schema: kindWork,
    workOf,
    untouched: (method) => ({
      method,
      options: firstKindOptions(given.snapshot().kind),
      label: null,
      rowVersion: null,
    }),
    firstMethod: () => (isAnalysable(given.snapshot()) ? firstMethod(given.snapshot()) : null),
  })
  const { present, snapshot, setOptions } = bench
  const kindBench: KindBench = {
    ...bench,
    method: computed(() => present.value && methodOf(snapshot.value.kind, present.value.method)),
    setOptions: (change) => setOptions(change as Partial<OwnOptions>),
  }
  provide(key, kindBench)
  return kindBench
}

/** The workbench around a component. @throws when used outside it */
export function useKindBench(): KindBench {
  const bench = inject(key, null)
  if (!bench) throw new Error('useKindBench belongs inside the workbench of a test of a kind of its own')
  return bench
}
