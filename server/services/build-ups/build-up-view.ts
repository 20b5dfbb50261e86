import type { buildUps } from '#server/db/tables'
import type { BuildUpView } from '#shared/scheme/build-up'

/** The only way from a build-up's row to the wire. */
export function buildUpView(row: typeof buildUps.$inferSelect): BuildUpView {
  return {
    id: row.id, name: row.name, sequence: row.sequence, edition: row.edition, version: row.version, retired: row.retired, changedAt: row.changedAt.toISOString(),
  }
}
