import { describe, expect, it } from 'vitest'
import { createCache } from '../../server/cache.ts'

describe('a cache of values that take long to make', () => {
  it('makes a value once while it is kept', async () => {
    const cached = createCache<number>(2)
    let made = 0
    const ask = () => cached('a', async () => ++made)
    expect(await Promise.all([ask(), ask()])).toEqual([1, 1])
  })

  it('forgets the value that was used longest ago', async () => {
    const cached = createCache<string>(2)
    await cached('a', async () => 'first a')
    await cached('b', async () => 'first b')
    await cached('a', async () => 'second a')
    await cached('c', async () => 'first c')
    expect(await cached('a', async () => 'third a')).toBe('first a')
    expect(await cached('b', async () => 'second b')).toBe('second b')
  })

  it('tries again after a failure', async () => {
    const cached = createCache<string>(2)
    await expect(cached('a', () => Promise.reject(new Error('disk')))).rejects.toThrow('disk')
    expect(await cached('a', async () => 'read')).toBe('read')
  })

  it('counts values by what they weigh, and keeps none that is heavier than all may be', async () => {
    const cached = createCache<string>(5, ({ length }) => length)
    await cached('a', async () => 'xx')
    await cached('b', async () => 'yyy')
    await cached('c', async () => 'z')
    expect(await cached('b', async () => 'made again')).toBe('yyy')
    expect(await cached('a', async () => 'aa')).toBe('aa')
    await cached('d', async () => 'far too long')
    expect(await cached('d', async () => 'short')).toBe('short')
  })
})
