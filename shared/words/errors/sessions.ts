import type { ErrorCatalogue } from './catalogue.ts'

export const sessionErrors = {
  'session/required': { status: 401, sentence: () => 'Sign in to go on. What you entered is kept.' },
  'session/wrong': { status: 401, sentence: () => 'The e-mail address or the password is not right.' },
} satisfies ErrorCatalogue
