import {
  boolean,
  double,
  index,
  int,
  json,
  mysqlEnum,
  mysqlTable,
  primaryKey,
  text,
  uniqueIndex,
  varchar,
} from 'drizzle-orm/mysql-core'
import { id, instant, reference, rowVersion } from './columns.ts'
import { visibility } from './wells.ts'

export const pumpingTests = mysqlTable(
  'pumping_tests',
  {
    id: id(),
    /** reported: only values came down to us, no readings. */
    kind: mysqlEnum(['constant-rate', 'reported', 'step', 'slug', 'specific-capacity']).notNull(),
    wellId: reference().notNull(),
    startAt: instant().notNull(),
    /** year: only the year is known; startAt is then its first instant. */
    startPrecision: mysqlEnum(['instant', 'day', 'year']).notNull(),
    zone: varchar({ length: 60 }).notNull(),
    aquifer: mysqlEnum(['confined', 'leaky', 'unconfined']).notNull(),
    /** Tested interval, depths below ground, frozen from the screens open at the date. */
    intervalTopM: double(),
    intervalBottomM: double(),
    intervalBasis: mysqlEnum(['screens', 'packers', 'open-hole', 'unknown']).notNull(),
    thicknessM: double(),
    thicknessBasis: mysqlEnum(['aquifer', 'screen', 'saturated', 'unknown']).notNull(),
    thicknessError: double().notNull(),
    rateError: double().notNull(),
    /** What the kind needs beyond the rest, with a version literal; empty for a test at a constant rate. */
    details: json().$type<unknown>(),
    /** Answers about the conditions of the test, with a version literal; empty where nothing was recorded. */
    checklist: json().$type<unknown>(),
    conditions: text(),
    source: varchar({ length: 300 }),
    visibility: visibility(),
    embargoUntil: instant(),
    createdBy: reference(),
    createdAt: instant().notNull(),
    rowVersion: rowVersion(),
  },
  (table) => [index('pumping_tests_well').on(table.wellId), index('pumping_tests_start').on(table.startAt)],
)

/** Share of the test's transmissivity that belongs to each unit; shares add up to one. */
export const testUnits = mysqlTable(
  'test_units',
  {
    id: id(),
    pumpingTestId: reference().notNull(),
    unitId: reference().notNull(),
    share: double().notNull(),
    basis: mysqlEnum(['single-unit', 'flow-log', 'judgement']).notNull(),
  },
  (table) => [uniqueIndex('test_units_pair').on(table.pumpingTestId, table.unitId)],
)

export const testWells = mysqlTable(
  'test_wells',
  {
    id: id(),
    pumpingTestId: reference().notNull(),
    wellId: reference().notNull(),
    role: mysqlEnum(['pumped', 'observation']).notNull(),
    distanceM: double().notNull(),
    distanceSdM: double().notNull(),
    distanceBasis: mysqlEnum(['measured', 'map', 'override']).notNull(),
    distanceReason: varchar({ length: 300 }),
    staticLevelM: double(),
    staticBasis: mysqlEnum(['given', 'mean-before-pumping']).notNull(),
  },
  (table) => [uniqueIndex('test_wells_pair').on(table.pumpingTestId, table.wellId)],
)

export const rateSteps = mysqlTable(
  'rate_steps',
  {
    id: id(),
    pumpingTestId: reference().notNull(),
    startS: double().notNull(),
    rateM3S: double().notNull(),
    /** As entered, so that the form shows what was typed. */
    enteredValue: double().notNull(),
    enteredUnit: varchar({ length: 20 }).notNull(),
  },
  (table) => [uniqueIndex('rate_steps_start').on(table.pumpingTestId, table.startS)],
)

export const readingSeries = mysqlTable(
  'reading_series',
  {
    id: id(),
    pumpingTestId: reference().notNull(),
    testWellId: reference().notNull(),
    quantity: mysqlEnum(['depth', 'level', 'drawdown']).notNull(),
    fileName: varchar({ length: 200 }).notNull(),
    fileSha256: varchar({ length: 64 }).notNull(),
    mapping: json().$type<Record<string, unknown>>().notNull(),
    rowCount: int().notNull(),
    takenCount: int().notNull(),
    createdBy: reference(),
    createdAt: instant().notNull(),
    deletedAt: instant(),
    rowVersion: rowVersion(),
  },
  (table) => [index('reading_series_test').on(table.pumpingTestId)],
)

/** Clustered by series and order: a series is read in one sweep. The raw line is kept for ever. */
export const readings = mysqlTable(
  'readings',
  {
    seriesId: reference().notNull(),
    seq: int().notNull(),
    fileRow: int().notNull(),
    raw: varchar({ length: 1000 }).notNull(),
    elapsedS: double(),
    valueM: double(),
    taken: boolean().notNull(),
    /** Comma-separated flags, empty when nothing was found. */
    flags: varchar({ length: 300 }).notNull(),
    /** What was found in the row, with the numbers its sentences need; empty when nothing was. */
    issues: json().$type<{ code: string; field: string; params: Record<string, string | number> }[]>(),
  },
  (table) => [primaryKey({ columns: [table.seriesId, table.seq] })],
)

/** The analyst's decisions about readings; the newest for a reading stands. */
export const readingEdits = mysqlTable(
  'reading_edits',
  {
    id: id(),
    seriesId: reference().notNull(),
    seq: int().notNull(),
    action: mysqlEnum(['leave-out', 'take']).notNull(),
    reason: varchar({ length: 300 }).notNull(),
    createdBy: reference(),
    createdAt: instant().notNull(),
  },
  (table) => [index('reading_edits_series').on(table.seriesId, table.seq)],
)
