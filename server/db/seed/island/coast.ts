import type { Ring } from './contour.ts'
import { signedArea, zeroRings } from './contour.ts'
import { inland } from './shape.ts'

/** Coastline rings of land, anticlockwise, largest first, in local metres. */
export const makeCoast = (cell = 80): Ring[] => zeroRings(inland, cell).filter((ring) => signedArea(ring) > 0)
