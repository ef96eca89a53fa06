import { and, eq, exists, inArray, isNull, ne, or, sql, type SQL } from 'drizzle-orm'
import { alias, QueryBuilder, type AnyMySqlColumn } from 'drizzle-orm/mysql-core'
import { atLeast, type Viewer } from '#shared/contracts/permissions.ts'
import { analyses, pumpingTests, wellCells, wells } from './schema/index.ts'

type Guarded = Record<'visibility' | 'createdBy', AnyMySqlColumn>

/**
 * What estimates, statistics and maps are computed from. Embargoes end through a job, which clears the date and moves
 * the data version, so that no cache outlives them: here a date, past or future, always hides.
 */
export type Scope = 'published' | 'internal'

export const scopeOf = (viewer: Viewer): Scope => (atLeast(viewer, 'analyst') ? 'internal' : 'published')

/** Stands for everybody of a scope, so that what is cached holds nobody's private records. */
export const viewerOfScope = (scope: Scope): Viewer => ({
  id: null,
  name: scope,
  role: scope === 'internal' ? 'analyst' : 'reader',
  mayReview: false,
})

function rowsWhere(table: Guarded, notEmbargoed: SQL, viewer: Viewer): SQL {
  if (atLeast(viewer, 'steward')) return sql`true`
  const open = atLeast(viewer, 'analyst')
    ? ne(table.visibility, 'private')
    : and(eq(table.visibility, 'published'), notEmbargoed)
  return (viewer.id === null ? open : or(open, eq(table.createdBy, viewer.id))) ?? sql`false`
}

const rows = (table: Guarded & { embargoUntil: AnyMySqlColumn }, viewer: Viewer): SQL =>
  rowsWhere(table, isNull(table.embargoUntil), viewer)

const parent = alias(wells, 'readable_parent')

/** The rows of a table that the viewer may see; a pumping test is never more visible than its well. */
export const readable = {
  wells: (viewer: Viewer): SQL => rows(wells, viewer),
  /** Counts of wells, by the same rule. */
  wellCells: (viewer: Viewer): SQL => rowsWhere(wellCells, eq(wellCells.embargoed, false), viewer),
  pumpingTests(viewer: Viewer): SQL {
    if (atLeast(viewer, 'steward')) return sql`true`
    const well = new QueryBuilder()
      .select({ one: sql`1` })
      .from(parent)
      .where(and(eq(parent.id, pumpingTests.wellId), rows(parent, viewer)))
    return and(rows(pumpingTests, viewer), exists(well)) ?? sql`false`
  },
  /**
   * Of the analyses of a test that the viewer may see: what is not decided yet, or was returned, is the business of
   * those who analyse.
   */
  analyses: (viewer: Viewer): SQL =>
    atLeast(viewer, 'analyst') ? sql`true` : inArray(analyses.state, ['accepted', 'withdrawn']),
}
