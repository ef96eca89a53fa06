import { boolean, double, index, int, json, mysqlEnum, mysqlTable, primaryKey, varchar } from 'drizzle-orm/mysql-core'
import { id, instant, reference, rowVersion } from './columns.ts'

/** Series from outside the wells of a test: air pressure, a river's stage, a tide gauge. */
export const outsideSeries = mysqlTable(
  'outside_series',
  {
    id: id(),
    pumpingTestId: reference().notNull(),
    quantity: mysqlEnum(['air-pressure', 'river-stage', 'tide-gauge']).notNull(),
    label: varchar({ length: 60 }).notNull(),
    fileName: varchar({ length: 200 }).notNull(),
    fileSha256: varchar({ length: 64 }).notNull(),
    mapping: json().$type<Record<string, unknown>>().notNull(),
    rowCount: int().notNull(),
    takenCount: int().notNull(),
    /** Of what was taken: seconds on the clock of the test, values in SI (Pa or m). */
    firstS: double().notNull(),
    lastS: double().notNull(),
    lowest: double().notNull(),
    highest: double().notNull(),
    createdBy: reference(),
    createdAt: instant().notNull(),
    deletedAt: instant(),
    rowVersion: rowVersion(),
  },
  (table) => [index('outside_series_test').on(table.pumpingTestId)],
)

/** As readings are kept: every line of the file, in its order, for ever. */
export const outsideReadings = mysqlTable(
  'outside_readings',
  {
    seriesId: reference().notNull(),
    seq: int().notNull(),
    fileRow: int().notNull(),
    raw: varchar({ length: 1000 }).notNull(),
    elapsedS: double(),
    /** In SI: Pa or m. */
    value: double(),
    taken: boolean().notNull(),
    flags: varchar({ length: 300 }).notNull(),
    issues: json().$type<{ code: string; field: string; params: Record<string, string | number> }[]>(),
  },
  (table) => [primaryKey({ columns: [table.seriesId, table.seq] })],
)

/** Corrections of the readings of a test. Removed ones stay, with who removed them. */
export const testCorrections = mysqlTable(
  'test_corrections',
  {
    id: id(),
    pumpingTestId: reference().notNull(),
    kind: varchar({ length: 20 }).notNull(),
    /** With a version literal. */
    settings: json().$type<unknown>().notNull(),
    /** The series that it follows, where it follows one. */
    outsideSeriesId: reference(),
    /** Wells whose readings it corrects; empty for all. */
    wellIds: json().$type<number[]>(),
    active: boolean().notNull(),
    createdBy: reference(),
    createdAt: instant().notNull(),
    changedBy: reference(),
    changedAt: instant().notNull(),
    deletedAt: instant(),
    rowVersion: rowVersion(),
  },
  (table) => [index('test_corrections_test').on(table.pumpingTestId)],
)

/** Wells beside those of the test that pumped before or during it. */
export const otherWells = mysqlTable(
  'other_wells',
  {
    id: id(),
    pumpingTestId: reference().notNull(),
    /** Of the map; empty for a place that was typed. */
    wellId: reference(),
    label: varchar({ length: 40 }).notNull(),
    place: json().$type<unknown>().notNull(),
    /** As entered, on the clock of the test. */
    rateSteps: json().$type<unknown>().notNull(),
    fitted: boolean().notNull(),
    active: boolean().notNull(),
    createdBy: reference(),
    createdAt: instant().notNull(),
    changedBy: reference(),
    changedAt: instant().notNull(),
    deletedAt: instant(),
    rowVersion: rowVersion(),
  },
  (table) => [index('other_wells_test').on(table.pumpingTestId), index('other_wells_well').on(table.wellId)],
)
