/** What a family of variograms must give. Registering it in the catalogue is all that is needed to fit and krige with it. */
export interface VariogramModel {
  readonly id: string
  readonly name: string
  /** Practical range over the range parameter that text books and other programs use for this family. */
  readonly practicalRangeFactor: number
  /** Correlation at a distance given as a share of the practical range; 1 at 0, falling. */
  readonly correlation: (u: number) => number
}
