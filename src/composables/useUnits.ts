import type { UnitSystem } from '#shared/quantities/systems.ts'
import { computed, type ComputedRef } from 'vue'
import { formatInterval, formatNumber, formatQuantity, type NumberFormat } from '#shared/quantities/format.ts'
import { fromSI, toSI, unitById, type Dimension } from '#shared/quantities/units.ts'
import { usePreferences } from '../stores/preferences.ts'

export interface Units {
  id(dimension: Dimension): string
  /** "m²/d", for axis titles and column heads. */
  label(dimension: Dimension): string
  /** "640 m²/d" from SI; "–" without a value. */
  quantity(valueSI: number | null | undefined, dimension: Dimension, format?: NumberFormat): string
  /** "640" from SI, for a column whose head carries the unit. */
  number(valueSI: number | null | undefined, dimension: Dimension, format?: NumberFormat): string
  /** "410 to 1 000 m²/d" from SI. */
  interval(lowSI: number, highSI: number, dimension: Dimension, format?: NumberFormat): string
  /** A number in the reader's unit, for a chart. */
  from(valueSI: number, dimension: Dimension): number
  /** Back to SI, from the reader's unit. */
  to(value: number, dimension: Dimension): number
}

/** Formatters in the reader's units; what uses them in a template or computed follows a switch of units at once. */
export function useUnits(): Units & { system: ComputedRef<UnitSystem> } {
  const preferences = usePreferences()
  const system = computed(() => preferences.unitSystem)
  const id = (dimension: Dimension) => system.value[dimension]
  const from = (valueSI: number, dimension: Dimension) => fromSI(valueSI, id(dimension))
  return {
    system,
    id,
    from,
    label: (dimension) => unitById(id(dimension)).label,
    quantity: (valueSI, dimension, format) => (valueSI == null ? '–' : formatQuantity(valueSI, id(dimension), format)),
    number: (valueSI, dimension, format) => (valueSI == null ? '–' : formatNumber(from(valueSI, dimension), format)),
    interval: (lowSI, highSI, dimension, format) => formatInterval(lowSI, highSI, id(dimension), format),
    to: (value, dimension) => toSI(value, id(dimension)),
  }
}
