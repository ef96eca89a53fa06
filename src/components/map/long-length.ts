import { formatNumber } from '#shared/quantities/format.ts'

const KM = 1_000
const MILE = 1_609.344

/** A distance as one reads it on a map: "12.4 km", or miles for readers who measure in feet. */
export const longLength = (metres: number, lengthUnit: string): string =>
  lengthUnit === 'ft' ? `${formatNumber(metres / MILE)} mi` : `${formatNumber(metres / KM)} km`

export const largeArea = (squareMetres: number, lengthUnit: string): string =>
  lengthUnit === 'ft' ? `${formatNumber(squareMetres / MILE ** 2)} mi²` : `${formatNumber(squareMetres / KM ** 2)} km²`
