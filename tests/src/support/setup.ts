import { afterEach } from 'vitest'
import { cleanUp } from './mount.ts'

// In a setup file, because files share their modules: a hook in one of these would be there for the first file alone.
afterEach(cleanUp)
