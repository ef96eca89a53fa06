import type { ErrorCatalogue } from './catalogue.ts'

/** What zod calls a format, as a person would. */
const formats: Record<string, string> = {
  email: 'an e-mail address, such as name@example.org',
  url: 'a web address, such as https://example.org',
  datetime: 'a date and time in UTC, such as 2026-03-01T12:00:00Z',
  date: 'a date, such as 2026-03-01',
}

/** Sentences under a single form field. */
export const fieldErrors = {
  'field/required': { status: 400, sentence: () => 'This is needed.' },
  'field/invalid': { status: 400, sentence: () => 'This value cannot be used.' },
  'field/too-small': { status: 400, sentence: ({ minimum }) => `Must be at least ${minimum}.` },
  'field/too-large': { status: 400, sentence: ({ maximum }) => `Must be at most ${maximum}.` },
  'field/too-short': { status: 400, sentence: ({ minimum }) => `Needs at least ${minimum} characters.` },
  'field/too-long': { status: 400, sentence: ({ maximum }) => `At most ${maximum} characters fit here.` },
  'field/format': {
    status: 400,
    sentence: ({ format }) => `Does not look like ${formats[String(format)] ?? 'what belongs here'}.`,
  },
  'field/choice': { status: 400, sentence: ({ options }) => `Choose one of: ${options}.` },
  'field/unknown': { status: 400, sentence: () => 'This field is not known here.' },
} satisfies ErrorCatalogue
