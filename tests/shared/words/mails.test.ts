import { describe, expect, it } from 'vitest'
import { invitationMail, passwordChangedMail, resetMail } from '#shared/words/mails.ts'

const makeWords = (overrides: object = {}) => ({
  region: 'Isle of Veldray',
  name: 'Field hydrogeologist',
  link: 'https://veldray.example/set-password#abc',
  invitedBy: 'Head of the book',
  ...overrides,
})

describe.each([
  ['an invitation', invitationMail],
  ['a reset', resetMail],
  ['a notice of change', passwordChangedMail],
])('%s', (_what, write) => {
  it('greets by name, names the region and ends with a line break', () => {
    const { subject, text } = write(makeWords())
    expect(subject).toContain('Isle of Veldray')
    expect(text).toMatch(/^Hello Field hydrogeologist,\n/)
    expect(text).toMatch(/[^\n]\n$/)
  })

  it('keeps the subject on one line of at most 200 characters, whatever the region is called', () => {
    const { subject } = write(makeWords({ region: `Two\r\nlines ${'x'.repeat(300)}` }))
    expect(subject).not.toMatch(/[\r\n]/)
    expect(subject.length).toBeLessThanOrEqual(200)
  })
})

it('links stand alone on their line, so that mail programs make them whole', () => {
  for (const { text } of [invitationMail(makeWords()), resetMail(makeWords())])
    expect(text.split('\n')).toContain('https://veldray.example/set-password#abc')
})
