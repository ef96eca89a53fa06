import Papa from 'papaparse'
import type { AdoptedValue } from '#shared/contracts/adopted-values.ts'
import { fromSI, unitById } from '#shared/quantities/units.ts'
import type { UnitSystem } from '#shared/quantities/systems.ts'

type Column = [header: string, cell: (value: AdoptedValue) => string | number | null]

const dimension = { T: 'transmissivity', S: 'storage', K: 'conductivity' } as const

function columns(system: UnitSystem): Column[] {
  const unitOf = ({ quantity }: AdoptedValue) => unitById(system[dimension[quantity]])
  const shown = (value: AdoptedValue, si: number) => fromSI(si, unitOf(value).id)
  return [
    ['well', ({ wellCode }) => wellCode],
    ['longitude_deg_wgs84', ({ lon }) => lon],
    ['latitude_deg_wgs84', ({ lat }) => lat],
    ['aquifer_unit', ({ unitName }) => unitName],
    ['quantity', ({ quantity }) => quantity],
    ['storage_class', ({ storageClass }) => storageClass],
    ['value', (value) => shown(value, value.value)],
    ['unit', (value) => unitOf(value).label],
    [
      `transmissivity_${unitById(system.transmissivity).label}`,
      (value) => (value.quantity === 'T' ? shown(value, value.value) : null),
    ],
    [
      `conductivity_${unitById(system.conductivity).label}`,
      (value) => (value.quantity === 'K' ? shown(value, value.value) : null),
    ],
    ['storativity_1', (value) => (value.quantity === 'S' ? value.value : null)],
    ['low_95', (value) => shown(value, value.low)],
    ['high_95', (value) => shown(value, value.high)],
    ['log10_error', ({ log10Error }) => log10Error],
    ['evidence', ({ evidence }) => evidence],
    ['method', ({ method }) => method],
    ['thickness_basis', ({ thicknessBasis }) => thicknessBasis],
    ['composite', ({ composite }) => (composite ? 'yes' : 'no')],
    ['used_in_estimates', ({ usable }) => (usable ? 'yes' : 'no')],
    ['test_year', ({ testYear }) => testYear],
    ['pumping_test_id', ({ pumpingTestId }) => pumpingTestId],
    ['analysis_id', ({ analysisId }) => analysisId],
    ['adopted_at_utc', ({ validFrom }) => validFrom],
  ]
}

/** The regional table as CSV with units in its headers; text that a spreadsheet would run as a formula is disarmed. */
export function adoptedValuesCsv(values: AdoptedValue[], system: UnitSystem): string {
  const layout = columns(system)
  const data = values.map((value) => layout.map(([, cell]) => cell(value)))
  // A byte order mark, so that spreadsheets read "²" as it is meant.
  return `\uFEFF${Papa.unparse({ fields: layout.map(([header]) => header), data }, { escapeFormulae: true, newline: '\r\n' })}\r\n`
}
