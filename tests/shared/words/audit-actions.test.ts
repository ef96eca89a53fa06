import { readdirSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { describe, expect, it } from 'vitest'
import { auditActionText, auditActionWords } from '#shared/words/audit-actions.ts'

const server = fileURLToPath(new URL('../../../server/api', import.meta.url))
const sources = readdirSync(server, { recursive: true, encoding: 'utf8' })
  .filter((name) => name.endsWith('.ts') && !name.endsWith('.routes.ts'))
  .map((name) => readFileSync(join(server, name), 'utf8'))
  .join('\n')

describe('The words for what is in the audit trail', () => {
  it.each(Object.keys(auditActionWords))('are for an action that the server records: %s', (action) => {
    expect(sources).toContain(`'${action}'`)
  })

  it('are there for every action that is recorded', () => {
    const recorded = [...sources.matchAll(/\baction: '([a-z-]+\/[a-z-]+)'/g)].map(([, action]) => action!)
    expect(recorded.length).toBeGreaterThan(20)
    expect(recorded.filter((action) => auditActionText(action) === action)).toEqual([])
  })

  it('read as a sentence does, each one of its own', () => {
    const words = Object.values(auditActionWords)
    expect(new Set(words).size).toBe(words.length)
    for (const text of words) expect(text).toMatch(/^[A-Z][a-z’, ]+[a-z]$/)
  })

  it('are the code itself for an action of another version, whatever its name', () => {
    expect(auditActionText('wells-of-old/lift')).toBe('wells-of-old/lift')
    expect(auditActionText('constructor')).toBe('constructor')
  })
})
