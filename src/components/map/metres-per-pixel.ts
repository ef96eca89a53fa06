/** Metres in a pixel of the Web Mercator map at a latitude. */
export const metresPerPixel = (lat: number, zoom: number): number =>
  (40_075_016.686 * Math.cos((lat * Math.PI) / 180)) / (256 * 2 ** zoom)
