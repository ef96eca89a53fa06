import { geodesyErrors } from '../geodesy.ts'
import type { ErrorEntry, ErrorParams } from './catalogue.ts'
import { clientErrors } from './client.ts'
import { fieldErrors } from './fields.ts'
import { jobErrors } from './jobs.ts'
import { peopleErrors } from './people.ts'
import { regionErrors } from './region.ts'
import { adoptedValueErrors } from './adopted-values.ts'
import { analysisErrors } from './analyses.ts'
import { correctionErrors } from './corrections.ts'
import { estimateErrors } from './estimates.ts'
import { pumpingTestErrors } from './pumping-tests.ts'
import { readingErrors } from './readings.ts'
import { requestErrors } from './requests.ts'
import { sessionErrors } from './sessions.ts'
import { visibilityErrors } from './visibility.ts'
import { wellErrors } from './wells.ts'

export type { ErrorParams } from './catalogue.ts'

/** Every error the program can answer with. To add an area, write its file and spread it here. */
export const errorCatalogue = {
  ...requestErrors,
  ...geodesyErrors,
  ...readingErrors,
  ...pumpingTestErrors,
  ...estimateErrors,
  ...analysisErrors,
  ...correctionErrors,
  ...adoptedValueErrors,
  ...fieldErrors,
  ...clientErrors,
  ...jobErrors,
  ...peopleErrors,
  ...regionErrors,
  ...sessionErrors,
  ...visibilityErrors,
  ...wellErrors,
}

export type ErrorCode = keyof typeof errorCatalogue

export const isErrorCode = (code: string): code is ErrorCode => Object.hasOwn(errorCatalogue, code)

export const errorStatus = (code: ErrorCode): number => errorCatalogue[code].status

export function errorText(code: ErrorCode, params: ErrorParams = {}): string {
  const entry: ErrorEntry = errorCatalogue[code]
  return entry.sentence(params)
}
