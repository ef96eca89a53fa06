/** Readings of one series: a reading every second for three days and a half. Longer logs must be thinned first. */
export const MAX_READINGS_PER_SERIES = 300_000

/** Rows shown before a mapping is confirmed. */
export const PREVIEW_ROWS = 20
