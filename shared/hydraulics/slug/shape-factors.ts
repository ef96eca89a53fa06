/** Open part of a well: its length L, its radius R, and the anisotropy m = √(Kh/Kv) that stretches it. */
export interface Intake {
  length_m: number
  radius_m: number
  /** Horizontal over vertical conductivity, square root; 1 where alike. */
  stretch: number
}

interface ShapeFactor {
  label: string
  /** F in Q = F·K·H, in metres. */
  factor: (intake: Intake) => number
}

/** Radius of influence over that of the well in the case of full penetration (common practice: 200). */
export const INFLUENCE_RATIO = 200

const elongated = (length_m: number, ratio: number) =>
  (2 * Math.PI * length_m) / Math.log(ratio + Math.sqrt(1 + ratio * ratio))

/**
 * Shape factors of intakes, F = q/(K·H), for the radius R = D/2.
 * Source: Hvorslev 1951, figure 12, cases 1 to 4 and 7 to 9.
 */
export const shapeFactors = {
  'screen-in-aquifer': {
    label: 'Screen inside the aquifer',
    factor: ({ length_m, radius_m, stretch }) => elongated(length_m, (stretch * length_m) / (2 * radius_m)),
  },
  'screen-at-boundary': {
    label: 'Screen beginning at a tight layer',
    factor: ({ length_m, radius_m, stretch }) => elongated(length_m, (stretch * length_m) / radius_m),
  },
  'screen-through-aquifer': {
    label: 'Screen through the whole aquifer',
    factor: ({ length_m }) => (2 * Math.PI * length_m) / Math.log(INFLUENCE_RATIO),
  },
  'open-end-in-aquifer': {
    label: 'Open end of the casing inside the aquifer',
    factor: ({ radius_m }) => 2.75 * 2 * radius_m,
  },
  'open-end-at-boundary': {
    label: 'Open end of the casing at a tight layer',
    factor: ({ radius_m }) => 2 * 2 * radius_m,
  },
  sphere: { label: 'Spherical intake', factor: ({ radius_m }) => 2 * Math.PI * 2 * radius_m },
  hemisphere: { label: 'Half a sphere at a tight layer', factor: ({ radius_m }) => Math.PI * 2 * radius_m },
} as const satisfies Record<string, ShapeFactor>

export type ShapeFactorId = keyof typeof shapeFactors
export const shapeFactorIds = Object.keys(shapeFactors) as ShapeFactorId[]

/** Whether a shape has a length, of which K is the mean. */
export const hasLength = (shape: ShapeFactorId) => shape.startsWith('screen')
