/**
 * The light half of geodesy. What reads the table of coordinate systems or proj4 is imported from its own file
 * (`crs.ts`, `transform.ts`, `place.ts`, `local-plane.ts`), in the browser by `import()`, so that a page pays for it
 * only when somebody asks for another system.
 */
export { inBox, widenBox, wrapLongitude } from './box.ts'
export { compassPoint } from './compass.ts'
export { CrsError, type CrsErrorCode } from './crs-error.ts'
export { formatLonLat, formatPlanar } from './format-position.ts'
export { bearing, destination, geodesicDistance } from './geodesic.ts'
export { fromMercatorInts, mercatorBits, mercatorInts, mercatorLatitude, type MercatorInts } from './mercator.ts'
export { likelySlip, type Slip } from './slip.ts'
export type { Box, LonLat, PlanarPoint } from './types.ts'
