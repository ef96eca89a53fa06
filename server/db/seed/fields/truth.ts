import { faultBlock } from '../island/fault.ts'
import type { Field } from './gaussian-field.ts'
import { gaussianField } from './gaussian-field.ts'
import type { AquiferCode, FieldQuantity } from './models.ts'
import { aquiferCodes, fieldModels } from './models.ts'
import { layerAt } from './structure.ts'

/** The quantities that the program estimates: Sy and elastic S are never pooled. */
export type TruthQuantity = 'T' | 'S' | 'Sy' | 'K'

export interface Truth {
  /**
   * The hidden value at a place, in SI (m²/s, 1, 1, m/s); local metres from the island's centre.
   * Null where the unit is absent or does not have the quantity (S of the gravels, Sy of confined units).
   */
  at: (unit: AquiferCode, quantity: TruthQuantity, x: number, y: number) => number | null
}

/** Moves the east block so far away that the field there owes nothing to the west one. */
const APART = 400_000

/** Values beyond a fault are independent: the blocks do not belong together. The gravels lie over it undisturbed. */
function faulted(field: Field): Field {
  return (x, y) => field(faultBlock(x, y) === 'east' ? x + APART : x, y)
}

function makeField(seed: number, unit: AquiferCode, quantity: FieldQuantity): Field {
  const field = gaussianField(seed, `${unit}/${quantity}`, fieldModels[unit][quantity])
  return unit === 'TG' ? field : faulted(field)
}

/** The hidden truth of the demo region for a seed. */
export function makeTruth(seed: number): Truth {
  const fields = Object.fromEntries(
    aquiferCodes.map((unit) => [unit, { T: makeField(seed, unit, 'T'), S: makeField(seed, unit, 'S') }]),
  ) as Record<AquiferCode, Record<FieldQuantity, Field>>
  const storage = (unit: AquiferCode) => (unit === 'TG' ? 'Sy' : 'S')
  return {
    at(unit, quantity, x, y) {
      const layer = layerAt(unit, x, y)
      if (!layer) return null
      const T = () => 10 ** fields[unit].T(x, y)
      if (quantity === 'T') return T()
      if (quantity === 'K') return T() / (layer.top - layer.bottom)
      return quantity === storage(unit) ? 10 ** fields[unit].S(x, y) : null
    },
  }
}
