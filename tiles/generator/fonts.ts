import { createRequire } from 'node:module'
import { GlobalFonts } from '@napi-rs/canvas'

const require = createRequire(import.meta.url)

/** Registered under names of our own, so that a Roboto of the machine is never drawn with by accident. */
function register(file: string, family: string): string {
  const path = require.resolve(`@fontsource/roboto/files/${file}.woff2`)
  if (!GlobalFonts.registerFromPath(path, family)) throw new Error(`the typeface ${path} cannot be read`)
  return family
}

const upright = register('roboto-latin-500-normal', 'basinbook-map-upright')
const italic = register('roboto-latin-400-italic', 'basinbook-map-italic')

export const fonts = {
  upright: (size: number) => `${size}px ${upright}`,
  italic: (size: number) => `${size}px ${italic}`,
}
