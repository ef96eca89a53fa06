export interface MailText {
  subject: string
  text: string
}

interface LinkMail {
  region: string
  name: string
  link: string
}

const lines = (...parts: string[]) => parts.join('\n') + '\n'
/** Subjects are one line, whatever a region or a person is called. */
const oneLine = (text: string) => text.replace(/\s+/g, ' ').trim()

export function invitationMail({ region, name, link, invitedBy }: LinkMail & { invitedBy: string }): MailText {
  return {
    subject: oneLine(`Your account for ${region}`).slice(0, 200),
    text: lines(
      `Hello ${oneLine(name)},`,
      '',
      `${oneLine(invitedBy)} has made an account for you in Basinbook, the book of wells and aquifer tests of ${oneLine(region)}.`,
      'Choose a password here to begin. The link works once and for seven days:',
      '',
      link,
      '',
      'If you did not expect this, do nothing: without a password the account stays closed.',
    ),
  }
}

export function resetMail({ region, name, link }: LinkMail): MailText {
  return {
    subject: oneLine(`A new password for ${region}`).slice(0, 200),
    text: lines(
      `Hello ${oneLine(name)},`,
      '',
      `somebody asked for a new password for your Basinbook account (${oneLine(region)}).`,
      'Choose one here. The link works once and for one hour:',
      '',
      link,
      '',
      'If it was not you, do nothing: your password stays as it is.',
    ),
  }
}

export function passwordChangedMail({ region, name }: Omit<LinkMail, 'link'>): MailText {
  return {
    subject: oneLine(`Your password for ${region} was changed`).slice(0, 200),
    text: lines(
      `Hello ${oneLine(name)},`,
      '',
      `the password of your Basinbook account (${oneLine(region)}) was changed just now, and everybody signed in with it was signed out.`,
      'If it was not you, ask for a new password on the sign-in page at once and tell your administrator.',
    ),
  }
}
