import { and, desc, eq, inArray } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { drawLook } from '#server/services/picture/draw-look'
import { schemeInWorkshop, type RevisionRow, type SchemeRow } from '#server/services/scheme/scheme-in-workshop'
import { materialsToday } from '#server/services/scheme/materials-today'
import { blanks, masks, paintOptics, paints, revisions } from '#server/db/tables'
import { type FilePicture, type FileRevision, SCHEME_FILE_FORMAT, SCHEME_FILE_ROOM, SCHEME_FILE_VERSION, type SchemeFile } from '#shared/files/scheme-file'
import { ENGINE_VERSION } from '#shared/optics/engine-version'
import type { Look } from '#shared/picture/look'
import type { SchemeBody } from '#shared/scheme/body'
import type { Materials } from '#shared/scheme/materials'
import { usedMaterials, usedPaintIds } from '#shared/scheme/used-materials'
import type { StoredOptics } from '#shared/shelf/stored-optics'
import { filePaint } from './file-paint'

/** Width of the pictures in a file, px. */
const PICTURE_WIDTH = 640

/** A scheme with its paints, blanks, masks, revisions and pictures as one file: all that another workshop needs to paint it alike. */
export async function writeSchemeFile(ctx: Ctx, schemeId: string): Promise<SchemeFile> {
  assertMay(ctx, 'scheme:read')
  const { file, looks } = await inTransaction(ctx, async (tx) => {
    const scheme = await schemeInWorkshop(tx, schemeId)
    const today = usedMaterials(scheme.draft, await materialsToday(tx, scheme.draft, 'used'))
    const frozen = await tx.db.select().from(revisions)
      .where(and(eq(revisions.schemeId, scheme.id), eq(revisions.workshopId, tx.workshopId))).orderBy(desc(revisions.number))
    const kept = newestThatFit(frozen)
    const newest = kept[0]
    return {
      file: await fileOf(tx, scheme, kept, frozen.length - kept.length),
      looks: [
        { of: 'draft' as const, look: { body: scheme.draft, materials: today } },
        ...newest ? [{ of: newest.number, look: { body: newest.body, materials: newest.materials } }] : [],
      ],
    }
  })
  // Painting takes a while and must not hold the transaction open.
  const pictures: FilePicture[] = []
  for (const { of, look } of looks) pictures.push(await pictureOf(ctx, of, look))
  return { ...file, pictures }
}

async function fileOf(tx: Ctx, scheme: SchemeRow, kept: readonly RevisionRow[], revisionsLeftOut: number): Promise<SchemeFile> {
  const bodies = [scheme.draft, ...kept.map(revision => revision.body)]
  const paintIds = [...new Set([...bodies.flatMap(usedPaintIds), ...kept.flatMap(revision => revision.materials.paints.map(paint => paint.id))])]
  const shelf = inOrder(paintIds, await tx.db.select({ id: paints.id, paint: paints, optics: paintOptics.data })
    .from(paints).innerJoin(paintOptics, eq(paintOptics.id, paints.opticsId))
    .where(and(eq(paints.workshopId, tx.workshopId), inArray(paints.id, paintIds))))
  const blankIds = [...new Set(bodies.map(body => body.blankId))]
  const maskIds = [...new Set(bodies.flatMap(body => body.masks.flatMap(mask => mask.fromMaskId ?? [])))]
  const optics = new Map<string, StoredOptics>()
  for (const { paint, optics: data } of shelf) optics.set(paint.opticsId, data)
  for (const revision of kept) for (const paint of revision.materials.paints) optics.set(paint.opticsId, paint.optics)
  const ownMasks = inOrder(maskIds, await tx.db.select({ id: masks.id, name: masks.name, form: masks.form }).from(masks)
    .where(and(eq(masks.workshopId, tx.workshopId), inArray(masks.id, maskIds))))
  return {
    format: SCHEME_FILE_FORMAT,
    version: SCHEME_FILE_VERSION,
    engineVersion: ENGINE_VERSION,
    scheme: { name: scheme.name, fish: scheme.fish },
    draft: withKnownMasks(scheme.draft, ownMasks),
    paints: shelf.map(({ paint }) => filePaint(paint)),
    optics: [...optics].map(([id, data]) => ({ id, data })),
    blanks: inOrder(blankIds, await tx.db.select({ id: blanks.id, name: blanks.name, shape: blanks.shape }).from(blanks)
      .where(and(eq(blanks.workshopId, tx.workshopId), inArray(blanks.id, blankIds)))),
    masks: ownMasks,
    revisions: kept.map(revision => ({ ...fileRevision(revision), body: withKnownMasks(revision.body, ownMasks) })),
    revisionsLeftOut,
    pictures: [],
  }
}

/** A mask whose origin is not among the workshop's own says nothing about one. */
function withKnownMasks(body: SchemeBody, own: readonly { id: string }[]): SchemeBody {
  return { ...body, masks: body.masks.map(mask => own.some(each => each.id === mask.fromMaskId) ? mask : { ...mask, fromMaskId: null }) }
}

function fileRevision({ number, note, publishedAt, engineVersion, body, materials }: RevisionRow): FileRevision {
  return { number, note, publishedAt: publishedAt.toISOString(), engineVersion, body, materials: { paints: materials.paints.map(withoutOptics), blank: materials.blank } }
}

function withoutOptics({ optics: _spectra, ...paint }: Materials['paints'][number]): Omit<Materials['paints'][number], 'optics'> {
  return paint
}

/** The newest revisions, as many as there is room for; optical data are counted with each, though they stand in the file once. */
function newestThatFit(frozen: readonly RevisionRow[]): RevisionRow[] {
  let room = SCHEME_FILE_ROOM
  const end = frozen.findIndex(({ body, materials }) => {
    room -= JSON.stringify([body, materials]).length
    return room < 0
  })
  return frozen.slice(0, end < 0 ? undefined : end)
}

function inOrder<T extends { id: string }>(ids: readonly string[], rows: readonly T[]): T[] {
  const byId = new Map(rows.map(row => [row.id, row]))
  return ids.flatMap(id => byId.get(id) ?? [])
}

async function pictureOf(ctx: Ctx, of: FilePicture['of'], look: Look): Promise<FilePicture> {
  const height = PICTURE_WIDTH / 2
  const { bytes } = await drawLook(ctx, look, { width: PICTURE_WIDTH, height })
  return { of, side: 'left', type: 'image/webp', width: PICTURE_WIDTH, height, base64: Buffer.from(bytes).toString('base64') }
}
