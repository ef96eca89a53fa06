import type { Deps } from '../../deps.ts'
import { listScreens } from './screens.repository.ts'

export function createWellsService(_deps: Deps) {
  return {
    /** All screens of a well, whenever they were valid. */
    screensOf: listScreens,
  }
}
