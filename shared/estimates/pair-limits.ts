/** Fewest pairs of specific capacity and T for a regression of the region's own (methods: diagnosis). */
export const FEWEST_PAIRS = 25
