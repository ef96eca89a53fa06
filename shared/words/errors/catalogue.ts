export type ErrorParams = Record<string, string | number>

export interface ErrorEntry {
  /** HTTP status of the answer that carries the error. */
  status: number
  /** What is wrong, where, and what to do. */
  sentence: (params: ErrorParams) => string
}

export type ErrorCatalogue = Record<`${string}/${string}`, ErrorEntry>
