import {
  boolean,
  double,
  index,
  int,
  json,
  mysqlEnum,
  mysqlTable,
  text,
  uniqueIndex,
  varchar,
} from 'drizzle-orm/mysql-core'
import { line, polygon } from '../spatial.ts'
import { id, instant, reference, rowVersion } from './columns.ts'

/** One installation is one region: this table has one row, id 1. */
export const region = mysqlTable('region', {
  id: int().primaryKey(),
  name: varchar({ length: 120 }).notNull(),
  /** Projected system of the region: distances and estimates are computed in it. */
  epsg: int().notNull(),
  /** Home extent in degrees: west, south, east, north. */
  extent: json().$type<[number, number, number, number]>().notNull(),
  unitSystem: varchar({ length: 20 }).notNull(),
  zone: varchar({ length: 60 }).notNull(),
  openToVisitors: boolean().notNull().default(false),
  rowVersion: rowVersion(),
})

export const aquiferUnits = mysqlTable(
  'aquifer_units',
  {
    id: id(),
    code: varchar({ length: 20 }).notNull(),
    name: varchar({ length: 120 }).notNull(),
    kind: mysqlEnum(['confined', 'leaky', 'unconfined', 'aquitard']).notNull(),
    parentId: reference(),
    /** Shallow units first. */
    depthOrder: int().notNull(),
    outline: polygon().notNull(),
    description: text(),
    rowVersion: rowVersion(),
  },
  (table) => [uniqueIndex('aquifer_units_code').on(table.code)],
)

export const unitStreams = mysqlTable(
  'unit_streams',
  {
    id: id(),
    unitId: reference().notNull(),
    streamId: reference().notNull(),
  },
  (table) => [uniqueIndex('unit_streams_pair').on(table.unitId, table.streamId)],
)

export const unitPicks = mysqlTable(
  'unit_picks',
  {
    id: id(),
    wellId: reference().notNull(),
    unitId: reference().notNull(),
    /** Depths below ground, m. */
    topM: double().notNull(),
    bottomM: double(),
    source: varchar({ length: 200 }).notNull(),
  },
  (table) => [uniqueIndex('unit_picks_pair').on(table.wellId, table.unitId), index('unit_picks_unit').on(table.unitId)],
)

export const boundaries = mysqlTable('boundaries', {
  id: id(),
  name: varchar({ length: 120 }).notNull(),
  kind: mysqlEnum(['fault', 'barrier', 'coast', 'constant-head']).notNull(),
  path: line().notNull(),
})

export const boundaryUnits = mysqlTable(
  'boundary_units',
  {
    id: id(),
    boundaryId: reference().notNull(),
    unitId: reference().notNull(),
  },
  (table) => [uniqueIndex('boundary_units_pair').on(table.boundaryId, table.unitId)],
)

export const streams = mysqlTable(
  'streams',
  {
    id: id(),
    name: varchar({ length: 120 }).notNull(),
    /** 1 is the main river. */
    streamOrder: int().notNull(),
    path: line().notNull(),
    createdAt: instant().notNull(),
  },
  (table) => [index('streams_name').on(table.name)],
)
