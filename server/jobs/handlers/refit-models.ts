import { z } from 'zod'
import type { Services } from '../../api/services.ts'
import type { JobHandler } from '../jobs.ts'

const payload = z.object({ unitId: z.int() })

/** Brings the models of one unit up to its data; fitting the same data twice changes nothing. */
export function refitModels({ estimates, region }: Services): JobHandler {
  return async (input, context) => {
    const { unitId } = payload.parse(input)
    const { epsg } = await region.get()
    await estimates.refit(unitId, epsg, async (done, total) => {
      await context.report({ done, total, message: '' })
      await context.checkCancelled()
    })
  }
}
