const points = [
  ...['N', 'NNE', 'NE', 'ENE', 'E', 'ESE', 'SE', 'SSE'],
  ...['S', 'SSW', 'SW', 'WSW', 'W', 'WNW', 'NW', 'NNW'],
]

/** The nearest of the sixteen compass points to a bearing in degrees: 0 is N, 200 is SSW. */
export function compassPoint(bearing: number): string {
  const turned = ((bearing % 360) + 360) % 360
  return points[Math.round(turned / 22.5) % points.length] ?? ''
}
