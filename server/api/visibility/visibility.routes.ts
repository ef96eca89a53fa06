import { z } from 'zod'
import { idInPath } from '#shared/contracts/common.ts'
import { visibilityAnswer, visibilityInput } from '#shared/contracts/visibility.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'
import type { Subject } from './visibility.repository.ts'

const subjects: { subject: Subject; path: `/${string}`; noun: string }[] = [
  { subject: 'well', path: '/api/wells/:id/visibility', noun: 'a well' },
  { subject: 'pumping-test', path: '/api/pumping-tests/:id/visibility', noun: 'a pumping test' },
]

export const visibilityRoutes = ({ visibility }: Services): Route[] =>
  subjects.map(({ subject, path, noun }) =>
    route(
      {
        method: 'put',
        path,
        action: 'visibility/edit',
        summary: `Publish, hide or embargo ${noun}`,
        params: z.object({ id: idInPath }),
        body: visibilityInput,
        response: visibilityAnswer,
      },
      ({ viewer, params: { id }, body }) => visibility.set(viewer, subject, id, body),
    ),
  )
