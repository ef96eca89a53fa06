/** Why a geostatistical computation was refused. */
export type GeostatisticsErrorCode = 'bad-input' | 'too-few' | 'singular'

/** Thrown for input that has no answer; `code` is stable, the message is for developers. */
export class GeostatisticsError extends Error {
  readonly code: GeostatisticsErrorCode

  constructor(code: GeostatisticsErrorCode, message: string) {
    super(message)
    this.name = 'GeostatisticsError'
    this.code = code
  }
}

/** Refuses NaN and infinities where they enter, so that nothing downstream has to ask. */
export function requireFinite(name: string, values: ArrayLike<number>): void {
  for (let i = 0; i < values.length; i++) {
    if (!Number.isFinite(values[i])) throw new GeostatisticsError('bad-input', `${name}[${i}] is not a finite number`)
  }
}
