import {
  bigint,
  boolean,
  double,
  index,
  int,
  mysqlEnum,
  mysqlTable,
  primaryKey,
  text,
  uniqueIndex,
  varchar,
} from 'drizzle-orm/mysql-core'
import { point } from '../spatial.ts'
import { id, instant, reference, rowVersion } from './columns.ts'

/** private: its creator and stewards see it, until it is released. */
export const visibility = () => mysqlEnum(['published', 'internal', 'private']).notNull()

export const wells = mysqlTable(
  'wells',
  {
    id: id(),
    /** Unique without regard to case (the column's collation sees to it). */
    code: varchar({ length: 40 }).notNull(),
    name: varchar({ length: 120 }),
    kind: mysqlEnum(['well', 'piezometer', 'planned']).notNull(),
    position: point().notNull(),
    /** Web Mercator integers (2^24 a side), so that map clusters are one grouped query. */
    mx: int().notNull(),
    my: int().notNull(),
    /** As given by the person or file that brought the well. */
    originalX: double().notNull(),
    originalY: double().notNull(),
    originalEpsg: int().notNull(),
    positionOperation: varchar({ length: 200 }).notNull(),
    positionAccuracyM: double().notNull(),
    groundElevationM: double(),
    measuringPointM: double(),
    verticalDatum: varchar({ length: 40 }),
    depthM: double(),
    wellRadiusM: double(),
    casingRadiusM: double(),
    staticDepthM: double(),
    drilledYear: int(),
    ownerLabel: varchar({ length: 120 }),
    notes: text(),
    visibility: visibility(),
    embargoUntil: instant(),
    createdBy: reference(),
    createdAt: instant().notNull(),
    rowVersion: rowVersion(),
  },
  (table) => [
    uniqueIndex('wells_code').on(table.code),
    // Everything that the map's groups and `readable` ask for, so that a grouped query reads the index alone.
    index('wells_mercator').on(table.mx, table.my, table.visibility, table.embargoUntil, table.createdBy),
  ],
)

const sum = () => bigint({ mode: 'number' }).notNull()

/**
 * How many wells stand in a square of the map, and the sums of their places: a view of a whole region adds up some cells
 * instead of all wells. Wells that not everybody sees alike are counted apart, by all that `readable` asks for. Written
 * by well-cells.ts alone, in the transaction that writes a well.
 */
export const wellCells = mysqlTable(
  'well_cells',
  {
    /** The side of the square is 2^bits of the Mercator integers; `cx` and `cy` count squares. */
    bits: int().notNull(),
    cx: int().notNull(),
    cy: int().notNull(),
    visibility: visibility(),
    embargoed: boolean().notNull(),
    /** 0 where nobody is known. */
    createdBy: reference().notNull(),
    wellCount: int().notNull(),
    /** The id itself where the well is alone. */
    sumId: sum(),
    sumMx: sum(),
    sumMy: sum(),
  },
  ({ bits, cx, cy, visibility: seenBy, embargoed, createdBy }) => [
    primaryKey({ columns: [bits, cx, cy, seenBy, embargoed, createdBy] }),
  ],
)

export const wellScreens = mysqlTable(
  'well_screens',
  {
    id: id(),
    wellId: reference().notNull(),
    /** Depths below ground, m. */
    topM: double().notNull(),
    bottomM: double().notNull(),
    validFrom: instant(),
    validTo: instant(),
  },
  (table) => [index('well_screens_well').on(table.wellId)],
)
