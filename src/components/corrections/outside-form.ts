import { outsideMapping, type OutsideMapping } from '#shared/contracts/outside-series.ts'
import { outsideQuantities, type OutsideQuantity } from '#shared/hydraulics/corrections/kinds.ts'
import type { LogInspection } from '#shared/readings/model.ts'
import { outsideColumn } from '#shared/readings/outside-column.ts'
import { formOf, timeOf, type LogForm } from '../pumping-tests/log-draft.ts'

/** The proposal for a series: as for a log, with the column that seems to hold it. */
export function outsideFormOf(inspection: LogInspection, quantity: OutsideQuantity): LogForm {
  const { column, unit } = outsideColumn(inspection, outsideQuantities[quantity].dimension)
  return { ...formOf(inspection), quantity: null, valueColumn: column, valueUnit: unit }
}

/** The finished mapping; null while a question is open. */
export function outsideMappingOf(
  form: LogForm,
  quantity: OutsideQuantity,
  { dateOrders }: Pick<LogInspection, 'dateOrders'>,
): OutsideMapping | null {
  if (form.timeKind === 'clock' && dateOrders.length > 1 && form.dateOrder === null) return null
  const { delimiter, decimalMark, firstDataRow, valueColumn: column, valueUnit: unit } = form
  const parsed = outsideMapping.safeParse({
    delimiter,
    decimalMark,
    firstDataRow,
    time: timeOf(form),
    value: { column, quantity, unit },
  })
  return parsed.success ? parsed.data : null
}
