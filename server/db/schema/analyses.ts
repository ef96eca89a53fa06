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
import { bytes, id, instant, reference, rowVersion } from './columns.ts'

export const analyses = mysqlTable(
  'analyses',
  {
    id: id(),
    pumpingTestId: reference().notNull(),
    method: varchar({ length: 40 }).notNull(),
    methodVersion: int().notNull(),
    state: mysqlEnum(['draft', 'submitted', 'accepted', 'returned', 'withdrawn']).notNull(),
    /** Of the snapshot in analysis_inputs, from which alone the analysis can be repeated. */
    inputsSha256: varchar({ length: 64 }).notNull(),
    /** Readings, rates or distances of the test are no longer those of the snapshot. */
    inputsChanged: boolean().notNull().default(false),
    /** Empty for a reported value. */
    options: json().$type<unknown>(),
    result: json().$type<unknown>().notNull(),
    label: varchar({ length: 120 }),
    rationale: text(),
    submittedAt: instant(),
    createdBy: reference(),
    createdAt: instant().notNull(),
    rowVersion: rowVersion(),
  },
  (table) => [index('analyses_test').on(table.pumpingTestId), index('analyses_state').on(table.state)],
)

/**
 * Snapshot of all inputs of an analysis with a version literal, packed (db/packed-json.ts) and cut into parts: a long log
 * does not fit into the largest statement that a database takes, and lists of analyses do not read it.
 */
export const analysisInputParts = mysqlTable(
  'analysis_input_parts',
  { analysisId: reference().notNull(), part: int().notNull(), bytes: bytes().notNull() },
  (table) => [primaryKey({ columns: [table.analysisId, table.part] })],
)

/** Everybody who made, changed or submitted an analysis: none of them reviews it. */
export const analysisEditors = mysqlTable(
  'analysis_editors',
  { analysisId: reference().notNull(), userId: reference().notNull() },
  (table) => [primaryKey({ columns: [table.analysisId, table.userId] })],
)

export const reviews = mysqlTable(
  'reviews',
  {
    id: id(),
    analysisId: reference().notNull(),
    decision: mysqlEnum(['accepted', 'returned']).notNull(),
    comment: text(),
    reviewerId: reference(),
    createdAt: instant().notNull(),
  },
  (table) => [index('reviews_analysis').on(table.analysisId)],
)

/** The regional table and its history: a row is current while validTo is empty. Values are replaced, never overwritten. */
export const adoptedValues = mysqlTable(
  'adopted_values',
  {
    id: id(),
    pumpingTestId: reference().notNull(),
    analysisId: reference().notNull(),
    wellId: reference().notNull(),
    unitId: reference().notNull(),
    quantity: mysqlEnum(['T', 'S', 'K']).notNull(),
    storageClass: mysqlEnum(['elastic', 'specific-yield', 'apparent', 'unclassified']),
    /** log10 of the value in SI (m²/s, 1, m/s), and the standard deviation of its error. */
    log10Value: double().notNull(),
    log10Error: double().notNull(),
    evidence: mysqlEnum(['firm', 'fair', 'slight']).notNull(),
    /** The rule that gave the evidence; the words are in shared/words/evidence.ts. Empty where it was not kept yet. */
    evidenceReason: varchar({ length: 40 }),
    method: varchar({ length: 40 }).notNull(),
    /** Where the drawdown behind it was measured. */
    origin: mysqlEnum(['observation-well', 'pumped-well', 'slug-test', 'other']).notNull(),
    thicknessBasis: mysqlEnum(['aquifer', 'screen', 'saturated', 'unknown']).notNull(),
    composite: boolean().notNull().default(false),
    /** Whether estimates may use it (S from a pumped well alone or of a slug test never is). */
    usable: boolean().notNull().default(true),
    testYear: int().notNull(),
    validFrom: instant().notNull(),
    validTo: instant(),
    replacedBy: reference(),
    adoptedBy: reference(),
    reviewId: reference(),
  },
  (table) => [
    index('adopted_values_current').on(table.unitId, table.quantity, table.validTo),
    index('adopted_values_valid').on(table.validTo, table.quantity),
    index('adopted_values_test').on(table.pumpingTestId),
    index('adopted_values_well').on(table.wellId, table.validTo),
    index('adopted_values_analysis').on(table.analysisId),
  ],
)

/** Counts every change that would alter an estimate of the unit. */
export const dataVersions = mysqlTable('data_versions', {
  unitId: reference().primaryKey(),
  version: int().notNull(),
})

/** Fitted by a job after the data version moved; until then the newest serves, with a note. */
export const variogramModels = mysqlTable(
  'variogram_models',
  {
    id: id(),
    unitId: reference().notNull(),
    quantity: varchar({ length: 4 }).notNull(),
    scope: mysqlEnum(['published', 'internal']).notNull(),
    dataVersion: int().notNull(),
    valueCount: int().notNull(),
    model: json().$type<unknown>().notNull(),
    createdAt: instant().notNull(),
  },
  (table) => [uniqueIndex('variogram_models_key').on(table.unitId, table.quantity, table.scope, table.dataVersion)],
)
