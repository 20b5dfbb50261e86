import type { RevisionRow, SchemeRow } from './scheme-in-workshop'
import type { Materials } from '#shared/scheme/materials'
import type { Origin, Painter, RevisionListItem, RevisionView, SchemeListItem, SchemeLookView, SchemeView } from '#shared/scheme/scheme-view'
import { coatsOf } from '#shared/scheme/stack-order'

/** One row of the list as the database answers it, without any body. */
export interface ListedScheme {
  id: string
  name: string
  fish: string
  blankId: string
  blankName: string
  version: number
  retired: boolean
  coats: number
  masks: number
  headNumber: number
  headId: string | null
  publishedAt: Date | null
  savedAt: Date
  savedById: string | null
  savedByName: string | null
}

function painter(id: string | null, name: string | null): Painter | null {
  return id !== null && name !== null ? { id, name } : null
}

/** Row to wire for those who may read recipes. */
export function schemeListItem(row: ListedScheme): SchemeListItem {
  return {
    sees: 'recipe',
    id: row.id,
    name: row.name,
    fish: row.fish,
    blank: { id: row.blankId, name: row.blankName },
    coats: row.coats,
    masks: row.masks,
    headNumber: row.headNumber,
    publishedAt: row.publishedAt?.toISOString() ?? null,
    draftIsAhead: row.publishedAt === null || row.savedAt > row.publishedAt,
    savedAt: row.savedAt.toISOString(),
    savedBy: painter(row.savedById, row.savedByName),
    retired: row.retired,
    pictureTag: `d${row.version}`,
  }
}

/** Row to wire for the front desk, built field by field: nothing of a recipe can follow. */
export function schemeLookView(row: Pick<ListedScheme, 'id' | 'name' | 'fish' | 'blankId' | 'blankName'> & { headId: string, publishedAt: Date }): SchemeLookView {
  return {
    sees: 'look',
    id: row.id,
    name: row.name,
    fish: row.fish,
    blank: { id: row.blankId, name: row.blankName },
    publishedAt: row.publishedAt.toISOString(),
    pictureTag: `r${row.headId.slice(0, 8)}`,
  }
}

/** A revision of the list; `coats` is counted by the database or from the body. */
export function revisionListItem(
  row: Pick<RevisionRow, 'id' | 'number' | 'note' | 'publishedAt' | 'publishedBy'>, coats: number, publishedByName: string | null,
): RevisionListItem {
  return {
    id: row.id,
    number: row.number,
    note: row.note,
    coats,
    publishedAt: row.publishedAt.toISOString(),
    publishedBy: painter(row.publishedBy, publishedByName),
  }
}

/** A whole revision; its hash stays on the server. */
export function revisionView(row: RevisionRow, schemeName: string, publishedByName: string | null): RevisionView {
  return {
    ...revisionListItem(row, coatsOf(row.body.stack).length, publishedByName),
    schemeId: row.schemeId,
    schemeName,
    body: row.body,
    materials: row.materials,
    engineVersion: row.engineVersion,
  }
}

/** A scheme as the build screen reads it. */
export function schemeView(
  row: SchemeRow, more: { materials: Materials, savedByName: string | null, origin: Origin | null, revisions: RevisionListItem[] },
): SchemeView {
  return {
    id: row.id,
    name: row.name,
    fish: row.fish,
    version: row.version,
    draft: row.draft,
    materials: more.materials,
    headNumber: row.headNumber,
    savedAt: row.savedAt.toISOString(),
    savedBy: painter(row.savedBy, more.savedByName),
    retired: row.retired,
    origin: more.origin,
    revisions: more.revisions,
  }
}
