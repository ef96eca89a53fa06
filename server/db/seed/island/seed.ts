/** Fixed before the region was drawn. Fields and records take their own seed; the land itself never changes. */
export const ISLAND_SEED = 1
