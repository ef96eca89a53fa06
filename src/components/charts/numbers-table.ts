export interface NumbersColumn {
  key: string
  title: string
  numeric: boolean
}

/** Texts and numbers by the key of their column; null: there is none. */
export type NumbersRow = Record<string, string | number | null>
