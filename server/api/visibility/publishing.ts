import { can, type Viewer } from '#shared/contracts/permissions.ts'
import type { VisibilityInput } from '#shared/contracts/visibility.ts'
import { fieldError } from '../../errors.ts'

/**
 * What everybody reads is a steward's decision, also at the moment a record is entered.
 * @throws AppError on the field `visibility`, with what to enter instead.
 */
export function checkPublishing(viewer: Viewer, { visibility }: Pick<VisibilityInput, 'visibility'>): void {
  if (visibility === 'published' && !can(viewer, 'visibility/edit'))
    throw fieldError('visibility', 'visibility/publishing-is-for-stewards')
}
