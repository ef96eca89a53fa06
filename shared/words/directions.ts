import { compassPoint } from '#shared/geodesy/compass.ts'

const letters: Record<string, string> = { N: 'north', E: 'east', S: 'south', W: 'west' }

/** A direction in words, by the sixteen points of the compass: 45° is `north-east`, 200° `south-south-west`. */
export const directionText = (bearing_deg: number): string =>
  [...compassPoint(bearing_deg)].map((letter) => letters[letter]).join('-')
