/** The symbols of plots as outlines in a square of twelve, for legends. */
export const symbolPaths: Record<string, string> = {
  circle: 'M6 2a4 4 0 1 0 .01 0z',
  diamond: 'M6 1l4 5-4 5-4-5z',
  triangle: 'M6 1.5l4.5 8.5h-9z',
  rect: 'M2.5 2.5h7v7h-7z',
  arrow: 'M6 1l4 9-4-3-4 3z',
  pin: 'M6 11C3 7 2.5 6 2.5 4.5a3.5 3.5 0 0 1 7 0C9.5 6 9 7 6 11z',
}
