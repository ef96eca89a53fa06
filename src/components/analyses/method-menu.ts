import type { AnalysisError } from '#shared/hydraulics/analysis-error.ts'
import type { AnalysisInputs } from '#shared/hydraulics/analysis.ts'
import { methodIds, methods, type MethodId } from '#shared/hydraulics/catalogue.ts'
import type { Family } from '#shared/hydraulics/method.ts'
import { obstacle } from '#shared/hydraulics/requirements.ts'

export interface OfferedMethod {
  id: MethodId
  /** Why it cannot be used on this test; null where it can. */
  obstacle: AnalysisError | null
}

export interface MethodGroup {
  title: string
  methods: OfferedMethod[]
}

const titles: Record<Exclude<Family, 'curve'>, string> = {
  line: 'Straight lines',
  recovery: 'Recovery after the stop',
  steady: 'Levels that have settled',
}

/** All methods as a menu offers them: curves made for this kind of aquifer first, those for other kinds last. */
export function methodGroups(inputs: AnalysisInputs): MethodGroup[] {
  const curves = methodIds.filter((id) => methods[id].family === 'curve')
  const made = curves.filter((id) => methods[id].aquifers.includes(inputs.aquifer))
  const others = curves.filter((id) => !made.includes(id))
  const families = Object.entries(titles).map(([family, title]) =>
    group(
      title,
      methodIds.filter((id) => methods[id].family === family),
      inputs,
    ),
  )
  return [
    group(`Curves for ${article[inputs.aquifer]} aquifer, as this one`, made, inputs),
    ...families,
    group('Curves for other aquifers', others, inputs),
  ]
}

const article: Record<AnalysisInputs['aquifer'], string> = {
  confined: 'a confined',
  leaky: 'a leaky',
  unconfined: 'an unconfined',
}

/** Methods that can be used come before those that cannot. */
function group(title: string, ids: MethodId[], inputs: AnalysisInputs): MethodGroup {
  const offered = ids.map((id) => ({ id, obstacle: obstacle(methods[id], inputs) }))
  const usable = offered.filter((one) => one.obstacle === null)
  return { title, methods: [...usable, ...offered.filter((one) => one.obstacle !== null)] }
}
