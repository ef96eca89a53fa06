import { inject, provide, ref, type InjectionKey, type Ref } from 'vue'
import type { Analysis, WorkbenchInputs } from '#shared/contracts/analyses.ts'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import type { AnalysisResult } from '#shared/hydraulics/analysis.ts'
import { methods, type MethodId } from '#shared/hydraulics/catalogue.ts'
import { plotOfMethod, type PlotKind } from '#shared/charts/plot-kinds.ts'
import { provideBench, type Bench } from '../workbench/use-bench.ts'
import { firstOptions } from './first-options.ts'
import { work, type Work } from './kept-work.ts'
import { isFitted, isPumped } from './outcome.ts'

/** The workbench of a pumping test: beside what all kinds of test have, its plots. */
export interface Workbench extends Bench<Work, AnalysisResult, WorkbenchInputs> {
  plotKind: Ref<PlotKind>
}

const key: InjectionKey<Workbench> = Symbol('workbench')

interface Given {
  test: () => PumpingTest
  snapshot: () => WorkbenchInputs
  analyses: () => readonly Analysis[]
  /** Opened by the address. */
  opened: () => number | null
}

export const phaseOf = (method: MethodId) => methods[method].needs.phase

function workOf(analysis: Analysis): Work | null {
  if (!isFitted(analysis)) return null
  const { method, options, label, rowVersion } = analysis
  return { method, options, label, rowVersion }
}

export function provideWorkbench(given: Given): Workbench {
  const plotKind = ref<PlotKind>('semi-log')
  const canStart = () => given.snapshot().inputs.series.length > 0 && isPumped(given.snapshot().inputs)
  const bench = provideBench<Work, AnalysisResult, WorkbenchInputs>({
    ...given,
    schema: work,
    workOf,
    untouched: (method) => ({
      method,
      options: firstOptions(method, given.snapshot().inputs),
      label: null,
      rowVersion: null,
    }),
    firstMethod: () => (canStart() ? 'cooper-jacob' : null),
    onOpen: (method) => (plotKind.value = plotOfMethod[method]),
  })
  const workbench: Workbench = { ...bench, plotKind }
  provide(key, workbench)
  return workbench
}

/** The workbench around a component. @throws when used outside it */
export function useWorkbench(): Workbench {
  const bench = inject(key, null)
  if (!bench) throw new Error('useWorkbench belongs inside the workbench of a pumping test')
  return bench
}
