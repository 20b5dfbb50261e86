import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { bodyHash } from '#server/services/scheme/body-hash'
import { addPaint } from '#server/services/shelf/add-paint'
import { renewOptics } from '#server/services/shelf/renew-optics'
import { blanks, masks, paintOptics, revisions, schemes } from '#server/db/tables'
import { bodyWithIds, type NewIds } from '#shared/files/body-with-ids'
import { revisionMaterials } from '#shared/files/revision-materials'
import type { FileRevision, SchemeFile } from '#shared/files/scheme-file'
import type { TakenIn } from '#shared/files/take-in-plan'
import { sameValue } from '#shared/scheme/canonical'
import type { StoredOptics } from '#shared/shelf/stored-optics'
import { draftOfFilePaint } from './file-paint'
import { othersFirst } from './others-first'
import { type Matches, matchSchemeFile } from './match-scheme-file'

/** What taking a scheme file in would do here; changes nothing. */
export async function lookAtSchemeFile(ctx: Ctx, file: SchemeFile): Promise<TakenIn> {
  mayTakeIn(ctx)
  return inTransaction(ctx, async (tx) => {
    await renewOptics(tx)
    return { schemeId: null, plan: (await matchSchemeFile(tx, file)).plan }
  })
}

/** Takes a scheme file in: what is here already is used, what is missing is added, and the scheme hangs on the wall with its revisions. All of it, or nothing. */
export async function takeInScheme(ctx: Ctx, file: SchemeFile): Promise<TakenIn> {
  mayTakeIn(ctx)
  return inTransaction(ctx, async (tx) => {
    await renewOptics(tx)
    const { matches, plan } = await matchSchemeFile(tx, file)
    const ids = await addWhatIsMissing(tx, file, matches)
    const draft = bodyWithIds(file.draft, ids)
    const [scheme] = await tx.db.insert(schemes).values({
      workshopId: tx.workshopId, name: file.scheme.name, fish: file.scheme.fish, blankId: draft.blankId, draft, savedBy: tx.personId,
      headNumber: Math.max(0, ...file.revisions.map(revision => revision.number)),
    }).returning({ id: schemes.id })
    const opticsIds = await keepOptics(tx, file, matches)
    for (const revision of file.revisions) await addRevision(tx, scheme!.id, file, revision, ids, opticsIds)
    return { schemeId: scheme!.id, plan }
  })
}

function mayTakeIn(ctx: Ctx): void {
  for (const action of ['scheme:change', 'shelf:change', 'blank:change', 'mask:change'] as const) assertMay(ctx, action)
}

/** Puts what the workshop lacks on its shelf, and among its blanks and masks; completes `matches` with it. */
async function addWhatIsMissing(tx: Ctx, file: SchemeFile, matches: Matches): Promise<NewIds> {
  for (const paint of file.paints.filter(each => !matches.paints.has(each.id))) {
    const { id, opticsId, optics } = await addPaint(tx, draftOfFilePaint(paint))
    matches.paints.set(paint.id, { id, opticsId, optics })
    await othersFirst()
  }
  for (const { id, name, shape } of file.blanks.filter(each => !matches.blanks.has(each.id))) {
    const [row] = await tx.db.insert(blanks).values({ workshopId: tx.workshopId, name, shape }).returning({ id: blanks.id })
    matches.blanks.set(id, row!.id)
  }
  for (const { id, name, form } of file.masks.filter(each => !matches.masks.has(each.id))) {
    const [row] = await tx.db.insert(masks).values({ workshopId: tx.workshopId, name, form }).returning({ id: masks.id })
    matches.masks.set(id, row!.id)
  }
  return { paints: new Map([...matches.paints].map(([id, paint]) => [id, paint.id])), blanks: matches.blanks, masks: matches.masks, buildUps: matches.buildUps }
}

/** The workshop's own optical data for those of the file's that a revision was made with; what no paint here has is kept as it was frozen. */
async function keepOptics(tx: Ctx, file: SchemeFile, matches: Matches): Promise<Map<string, string>> {
  const kept = new Map<string, string>()
  const needed = new Set(file.revisions.flatMap(revision => revision.materials.paints.map(paint => paint.opticsId)))
  for (const { id, data } of file.optics.filter(each => needed.has(each.id))) {
    const ofPaint = file.paints.filter(paint => paint.opticsId === id).map(paint => matches.paints.get(paint.id)).find(paint => paint && sameValue(paint.optics, data))
    kept.set(id, ofPaint?.opticsId ?? await addOptics(tx, data))
  }
  return kept
}

async function addOptics(tx: Ctx, data: StoredOptics): Promise<string> {
  const [row] = await tx.db.insert(paintOptics).values({ workshopId: tx.workshopId, engineVersion: data.engineVersion, data }).returning({ id: paintOptics.id })
  return row!.id
}

async function addRevision(tx: Ctx, schemeId: string, file: SchemeFile, revision: FileRevision, ids: NewIds, opticsIds: ReadonlyMap<string, string>): Promise<void> {
  const body = bodyWithIds(revision.body, ids)
  const frozen = revisionMaterials(file, revision)
  const materials = {
    paints: frozen.paints.map(paint => ({ ...paint, id: ids.paints.get(paint.id) ?? paint.id, opticsId: opticsIds.get(paint.opticsId) ?? paint.opticsId })),
    blank: { id: body.blankId, shape: frozen.blank.shape },
  }
  const { number, note, engineVersion, publishedAt } = revision
  await tx.db.insert(revisions).values({
    workshopId: tx.workshopId, schemeId, number, note, body, materials, bodyHash: bodyHash(body, materials), engineVersion, publishedAt: new Date(publishedAt), publishedBy: null,
  })
}
