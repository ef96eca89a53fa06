import type { ErrorCatalogue } from './catalogue.ts'

export const estimateErrors = {
  'estimate/unknown-unit': { status: 400, sentence: () => 'This aquifer unit does not exist.' },
} satisfies ErrorCatalogue
