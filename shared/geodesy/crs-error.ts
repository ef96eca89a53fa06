export type CrsErrorCode = 'crs/unknown' | 'crs/refused' | 'crs/not-finite' | 'crs/outside-area'

/** Why a coordinate system could not be used. `params` feed the sentence. */
export class CrsError extends Error {
  readonly code: CrsErrorCode
  readonly params: Record<string, string | number>

  constructor(code: CrsErrorCode, params: Record<string, string | number>) {
    super(`${code} ${JSON.stringify(params)}`)
    this.name = 'CrsError'
    this.code = code
    this.params = params
  }
}
