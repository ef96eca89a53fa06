/** A method as the menu of new analyses offers it. */
export interface OfferedEntry {
  id: string
  /** What it needs and where it comes from. */
  facts: string
  /** Why it cannot be used on this test; empty where it can. */
  obstacle: string
}

export interface OfferedGroup {
  title: string
  methods: readonly OfferedEntry[]
}
