/** Numbers that the rules turn on. The project's choice where no source is named; none comes from a standard. */
export const LIMITS = {
  /** Nearest value as a share of the range, and how many within it, to call tests near. */
  nearShare: 1 / 3,
  farShare: 2 / 3,
  nearCount: 5,
  /** Extent of the values over that of the unit, below which they are one cluster. */
  clusterShare: 0.2,
  mostOfWeight: 0.5,
  edge_m: 500,
  coast_m: 1000,
  stream_m: 500,
  agree: 0.2,
  disagree: 0.45,
  /** Upper over lower end of the 95 % interval. */
  narrow: 5,
  wide: 20,
  veryWide: 100,
  nuggetShare: 0.75,
  /** Position accuracy over the distance to the value. */
  position: 0.25,
  slugShare: 0.3,
  compositeShare: 0.25,
  secondOpinion: 2,
  /** Depth outside the tested screens that is still let pass, m. */
  depthSlack_m: 2,
} as const
