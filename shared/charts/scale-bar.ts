import { formatNumber } from '#shared/quantities/format.ts'

export interface ScaleBar {
  px: number
  label: string
}

/** Units of a scale bar, large first, with the metres in one. */
const ladders = {
  metric: [
    { label: 'km', metres: 1000 },
    { label: 'm', metres: 1 },
  ],
  feet: [
    { label: 'mi', metres: 1609.344 },
    { label: 'ft', metres: 0.3048 },
  ],
} as const

/** The largest of 1, 2, 5 times a power of ten that is not above `value`. */
function roundDown(value: number): number {
  const power = 10 ** Math.floor(Math.log10(value))
  const step = [5, 2, 1].find((digit) => digit * power <= value) ?? 1
  return step * power
}

/** A round distance that is at most `mostPx` long on the screen. */
export function scaleBar(metresPerPx: number, mostPx: number, lengthUnit: string): ScaleBar {
  const ladder = ladders[lengthUnit === 'ft' ? 'feet' : 'metric']
  const most = metresPerPx * mostPx
  const unit = ladder.find(({ metres }) => most >= metres) ?? ladder[1]
  const round = roundDown(most / unit.metres)
  return { px: (round * unit.metres) / metresPerPx, label: `${formatNumber(round, { trim: true })} ${unit.label}` }
}
