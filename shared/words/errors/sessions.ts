import { waitingTime } from '../durations.ts'
import type { ErrorCatalogue } from './catalogue.ts'

export const sessionErrors = {
  'session/required': { status: 401, sentence: () => 'Sign in to go on. What you entered is kept.' },
  'session/wrong': { status: 401, sentence: () => 'The e-mail address or the password is not right.' },
  'session/too-many-attempts': {
    status: 429,
    sentence: ({ seconds }) =>
      `Too many wrong passwords for this account. Try again in ${waitingTime(seconds)}, or ask for a new password.`,
  },
  'session/demo-refused': {
    status: 403,
    sentence: () =>
      'Demo accounts have published passwords, so they only work on the computer that runs the program. Ask an administrator for an account of your own.',
  },
  'password/wrong': { status: 400, sentence: () => 'This is not your present password.' },
  'password/like-email': { status: 400, sentence: () => 'Choose a password that differs from the e-mail address.' },
  'password/link-ended': {
    status: 410,
    sentence: () => 'This link was used already or has run out. Ask for a new one.',
  },
} satisfies ErrorCatalogue
