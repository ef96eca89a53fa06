import type { Services } from '../../api/services.ts'
import type { JobHandler } from '../jobs.ts'

export const liftEmbargoes =
  ({ visibility }: Services): JobHandler =>
  () =>
    visibility.liftEmbargoes()
