import type { AdoptedValue } from '#shared/contracts/adopted-values.ts'
import type { FoundValue } from './adopted-values.repository.ts'

const normal975 = 1.959963984540054

export function adoptedValueView({
  row,
  wellCode,
  position: [lon, lat],
  unitName,
  inputsChanged,
  adoptedByName,
}: FoundValue): AdoptedValue {
  const { log10Value, log10Error, method } = row
  return {
    ...row,
    method: method as AdoptedValue['method'],
    wellCode,
    lon,
    lat,
    unitName,
    value: 10 ** log10Value,
    low: 10 ** (log10Value - normal975 * log10Error),
    high: 10 ** (log10Value + normal975 * log10Error),
    inputsChanged,
    validFrom: row.validFrom.toISOString(),
    validTo: row.validTo?.toISOString() ?? null,
    adoptedBy: adoptedByName,
  }
}
