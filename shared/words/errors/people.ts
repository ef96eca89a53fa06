import type { ErrorCatalogue } from './catalogue.ts'

export const peopleErrors = {
  'people/address-taken': { status: 409, sentence: () => 'Somebody with this e-mail address is on the list already.' },
  'people/review-needs-analyst': {
    status: 400,
    sentence: () => 'A reader cannot hold the review right. Choose the role of analyst or above first.',
  },
  'people/last-administrator': {
    status: 409,
    sentence: () =>
      'This is the last active administrator. Make somebody else administrator first, then change this account.',
  },
  'people/already-joined': {
    status: 409,
    sentence: () => 'This person has set a password already and needs no invitation.',
  },
  'people/deactivated': { status: 409, sentence: () => 'This account is deactivated. Activate it first.' },
} satisfies ErrorCatalogue
