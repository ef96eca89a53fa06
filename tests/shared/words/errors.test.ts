import { describe, expect, it } from 'vitest'
import { errorCatalogue, errorStatus, errorText, isErrorCode, type ErrorCode } from '#shared/words/errors/index.ts'
import { waitingTime } from '#shared/words/durations.ts'

const codes = Object.keys(errorCatalogue) as ErrorCode[]

describe('the sentences of errors', () => {
  it('are plain: they end with a full stop, or with what was typed, and shout at nobody', () => {
    for (const code of codes) {
      const text = errorText(code)
      expect(text, code).toMatch(/([.?]|undefined)$/)
      expect(text, code).not.toContain('!')
    }
  })

  it('have a code of area and reason and the status of an error', () => {
    for (const code of codes) {
      expect(code).toMatch(/^[a-z-]+\/[a-z0-9-]+$/)
      expect(errorStatus(code), code).toBeGreaterThanOrEqual(400)
    }
  })

  it('are known by their own codes only', () => {
    expect(isErrorCode('session/wrong')).toBe(true)
    for (const code of ['toString', 'session/none', '']) expect(isErrorCode(code)).toBe(false)
  })

  it('name a format as a person would', () => {
    expect(errorText('field/format', { format: 'email' })).toBe(
      'Does not look like an e-mail address, such as name@example.org.',
    )
    expect(errorText('field/format', { format: 'regex' })).toBe('Does not look like what belongs here.')
  })
})

describe('a waiting time', () => {
  it.each([
    [1, '1 s'],
    [89, '89 s'],
    [90, '2 min'],
    [900, '15 min'],
    ['61.2', '62 s'],
  ])('of %s seconds is %s', (seconds, text) => expect(waitingTime(seconds)).toBe(text))
})
