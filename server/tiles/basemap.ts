import type { Basemap } from '#shared/contracts/basemap.ts'
import type { Archive } from './archive.ts'
import { openArchive } from './archive.ts'
import type { BundledTiles, ThemeName } from './bundled.ts'
import { BUNDLED_ZOOM, openBundledTiles, themes } from './bundled.ts'

/** The organisation's own map, as the configuration names it. */
export interface CustomBasemap {
  light: string
  dark: string
  attribution: string
}

export interface Basemaps {
  bundled: BundledTiles
  custom: Record<ThemeName, Archive> | null
}

/** Opens the organisation's map for both themes. Throws ArchiveError for an unusable archive. */
export async function openCustom({ light, dark }: CustomBasemap): Promise<Record<ThemeName, Archive>> {
  const day = await openArchive(light)
  return { light: day, dark: dark === light ? day : await openArchive(dark) }
}

/** Opens the bundled map and, when configured, the organisation's own. Throws ArchiveError for an unusable archive. */
export async function openBasemaps(custom: CustomBasemap | null): Promise<Basemaps> {
  return { bundled: openBundledTiles(), custom: custom && (await openCustom(custom)) }
}

const forThemes = (url: (theme: ThemeName) => string) =>
  Object.fromEntries(themes.map((theme) => [theme, url(theme)])) as Record<ThemeName, string>

function customSource(custom: Record<ThemeName, Archive>, attribution: string): Basemap {
  const { light, dark } = custom
  return {
    id: 'custom',
    urls: forThemes((theme) => `/tiles/custom/${theme}/{z}/{x}/{y}?v=${custom[theme].version}`),
    minZoom: Math.max(light.minZoom, dark.minZoom),
    maxNativeZoom: Math.min(light.maxZoom, dark.maxZoom),
    bounds: light.bounds,
    attribution: attribution || light.attribution,
  }
}

/**
 * What a browser needs to show the maps, the one to show first in front. The version in the addresses lets a browser
 * keep tiles for ever.
 */
export async function basemapInfo(maps: Basemaps, attribution = ''): Promise<Basemap[]> {
  const version = await maps.bundled.version()
  const bundled: Basemap = {
    id: 'bundled',
    urls: forThemes((theme) => `/tiles/${theme}/{z}/{x}/{y}.webp?v=${version}`),
    minZoom: 0,
    maxNativeZoom: BUNDLED_ZOOM,
    bounds: null,
    attribution: 'Land outlines: Natural Earth. The Isle of Veldray is invented.',
  }
  return maps.custom ? [customSource(maps.custom, attribution), bundled] : [bundled]
}
