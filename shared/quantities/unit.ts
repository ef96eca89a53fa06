/** What a number measures. A unit belongs to exactly one dimension. */
export type Dimension =
  'length' | 'time' | 'discharge' | 'transmissivity' | 'conductivity' | 'specificCapacity' | 'pressure' | 'storage'

/**
 * A measurement unit.
 * `toSI` is the number that multiplies a value in this unit to give SI (m, s, m³/s, m²/s, m/s, Pa, 1).
 * `aliases` are other spellings, besides id and label, that `recogniseUnit` accepts.
 * `source` says where the factor comes from: NIST SP 811 (2008), Appendix B.8, entry in quotation marks; or how it is composed.
 */
export interface Unit {
  id: string
  dimension: Dimension
  label: string
  toSI: number
  aliases: string[]
  source: string
}
