import type { InputParts } from './build-inputs.ts'

/** A reading with a time and a value, and whether it counts after what was decided about it. */
export interface DecidedReading {
  seq: number
  elapsedS: number
  valueM: number
  included: boolean
  flags: string
}

/** Readings of a log in order of time; a step backwards in time stays in the file. */
export function decidedReadings(
  { id }: { id: number },
  { readings, edits }: Pick<InputParts, 'readings' | 'edits'>,
): DecidedReading[] {
  const decided = new Map(
    edits.filter(({ seriesId }) => seriesId === id).map(({ seq, action }) => [seq, action === 'take']),
  )
  return readings
    .flatMap(({ seriesId, seq, elapsedS, valueM, taken, flags }) =>
      seriesId === id && elapsedS !== null && valueM !== null
        ? [{ seq, elapsedS, valueM, flags, included: decided.get(seq) ?? taken }]
        : [],
    )
    .sort((a, b) => a.elapsedS - b.elapsedS || a.seq - b.seq)
}
