import type { Services } from '../../../api/services.ts'
import type { DemoTest } from '../records/types.ts'
import type { Cast } from './people.ts'

/** A test is as open as its well, and embargoed with it; the steward decides that, not the person who enters it. */
export async function publishTest(
  { visibility }: Services,
  { steward }: Cast,
  { id, rowVersion }: { id: number; rowVersion: number },
  { visibility: wanted, embargoUntil }: Pick<DemoTest, 'visibility' | 'embargoUntil'>,
) {
  if (wanted === 'internal') return
  const until = embargoUntil === null ? null : new Date(embargoUntil).toISOString()
  await visibility.set(steward, 'pumping-test', id, { rowVersion, visibility: wanted, embargoUntil: until })
}
