import type { ErrorCatalogue } from './catalogue.ts'

/** Sentences under a single form field. */
export const fieldErrors = {
  'field/required': { status: 400, sentence: () => 'This is needed.' },
  'field/invalid': { status: 400, sentence: () => 'This value cannot be used.' },
  'field/too-small': { status: 400, sentence: ({ minimum }) => `Must be at least ${minimum}.` },
  'field/too-large': { status: 400, sentence: ({ maximum }) => `Must be at most ${maximum}.` },
  'field/too-short': { status: 400, sentence: ({ minimum }) => `Needs at least ${minimum} characters.` },
  'field/too-long': { status: 400, sentence: ({ maximum }) => `At most ${maximum} characters fit here.` },
  'field/format': { status: 400, sentence: ({ format }) => `Does not look like ${format}.` },
  'field/choice': { status: 400, sentence: ({ options }) => `Choose one of: ${options}.` },
  'field/unknown': { status: 400, sentence: () => 'This field is not known here.' },
} satisfies ErrorCatalogue
