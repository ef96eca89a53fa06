import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { rmSync } from 'node:fs'
import { join } from 'node:path'
import { afterAll, describe, expect, it } from 'vitest'
import { lockHolder, takeLock, waitForLock } from '../../../server/setup/locks.mjs'
import { inRoot } from '../../../server/setup/places.mjs'
import { temporaryFolder } from '../../support/temporary.ts'

const folder = temporaryFolder()
afterAll(() => rmSync(folder, { recursive: true }))

const refusal = ({ pid, purpose }: { pid: number; purpose: string }) => `taken by ${pid} to ${purpose}`

/** Another process that takes the lock and holds it until it is killed. */
async function makeHolder(path: string) {
  const script = `
    import { takeLock } from ${JSON.stringify(inRoot('server/setup/locks.mjs'))}
    takeLock(${JSON.stringify(path)}, 'run', () => '')
    process.stdout.write('held')
    setInterval(() => {}, 1000)`
  const child = spawn(process.execPath, ['--input-type=module', '-e', script], { stdio: ['ignore', 'pipe', 'inherit'] })
  await once(child.stdout, 'data')
  return child
}

describe('a lock', () => {
  it('that another process holds is refused, naming it', async () => {
    const path = join(folder, 'refused')
    const holder = await makeHolder(path)
    expect(() => takeLock(path, 'restore', refusal)).toThrow(`taken by ${holder.pid} to run`)
    expect(lockHolder(path)).toEqual({ pid: holder.pid, purpose: 'run' })
    holder.kill('SIGKILL')
    await once(holder, 'exit')
  })

  it('ends with its holder, even one that was killed outright', async () => {
    const path = join(folder, 'killed')
    const holder = await makeHolder(path)
    holder.kill('SIGKILL')
    await once(holder, 'exit')
    expect(lockHolder(path)).toBeNull()
    takeLock(path, 'run', refusal)()
  })

  it('can be taken again once it is given back', () => {
    const path = join(folder, 'again')
    takeLock(path, 'run', refusal)()
    const release = takeLock(path, 'backup', refusal)
    expect(() => takeLock(path, 'run', refusal)).toThrow(`taken by ${process.pid} to backup`)
    release()
  })

  it('is waited for until it is given back', async () => {
    const path = join(folder, 'waiting')
    const order: string[] = []
    const release = await waitForLock(path)
    const second = waitForLock(path).then((releaseSecond) => {
      order.push('second')
      releaseSecond()
    })
    order.push('first done')
    release()
    await second
    expect(order).toEqual(['first done', 'second'])
  })
})
