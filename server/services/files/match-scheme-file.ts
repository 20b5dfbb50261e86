import { eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { deriveOptics } from '#server/services/shelf/derive-optics'
import { blanks, buildUps, masks, paintOptics, paints, schemes } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import type { FilePaint, SchemeFile } from '#shared/files/scheme-file'
import type { TakeInPlan } from '#shared/files/take-in-plan'
import { ENGINE_VERSION } from '#shared/optics/engine-version'
import { sameValue } from '#shared/scheme/canonical'
import { coatsOf } from '#shared/scheme/stack-order'
import { isSameKnown } from '#shared/shelf/same-known'
import type { StoredOptics } from '#shared/shelf/stored-optics'
import { filePaint } from './file-paint'
import { othersFirst } from './others-first'

/** What of a file is in the workshop already: by the file's id the workshop's own. What is missing is new. */
export interface Matches {
  paints: Map<string, { id: string, opticsId: string, optics: StoredOptics }>
  blanks: Map<string, string>
  masks: Map<string, string>
  /** Build-ups of the workshop that coats of the file are linked to. */
  buildUps: Set<string>
}

/** What taking a file in would do here. Refuses a paint whose colour the engine cannot use, with its place in the file. */
export async function matchSchemeFile(tx: Ctx, file: SchemeFile): Promise<{ matches: Matches, plan: TakeInPlan }> {
  const matches: Matches = { paints: new Map(), blanks: new Map(), masks: new Map(), buildUps: new Set() }
  const shelf = await tx.db.select({ paint: paints, optics: paintOptics.data }).from(paints)
    .innerJoin(paintOptics, eq(paintOptics.id, paints.opticsId)).where(eq(paints.workshopId, tx.workshopId)).orderBy(paints.retired, paints.createdAt)
  const planned: TakeInPlan['paints'] = []
  for (const [i, paint] of file.paints.entries()) {
    planned.push(matchPaint(paint, i))
    await othersFirst()
  }
  function matchPaint(paint: FilePaint, i: number): TakeInPlan['paints'][number] {
    const sameName = shelf.filter(row => row.paint.name === paint.name)
    const same = sameName.find(row => isSameKnown(row.paint.known, paint.known))
    if (!same) {
      assertUsable(paint, i)
      return { name: paint.name, is: 'new', because: sameName.length > 0 ? 'A paint of this name is on the shelf, of another colour. Both stay.' : '' }
    }
    matches.paints.set(paint.id, { id: same.paint.id, opticsId: same.paint.opticsId, optics: same.optics })
    return { name: paint.name, is: 'on the shelf', because: standing(paint, same.paint) }
  }
  const ownBlanks = await tx.db.select({ id: blanks.id, name: blanks.name, shape: blanks.shape }).from(blanks).where(eq(blanks.workshopId, tx.workshopId)).orderBy(blanks.retired, blanks.createdAt)
  const ownMasks = await tx.db.select({ id: masks.id, name: masks.name, form: masks.form }).from(masks).where(eq(masks.workshopId, tx.workshopId)).orderBy(masks.retired, masks.createdAt)
  const ownBuildUps = await tx.db.select({ id: buildUps.id }).from(buildUps).where(eq(buildUps.workshopId, tx.workshopId))
  for (const { id } of ownBuildUps) matches.buildUps.add(id)
  const names = await tx.db.select({ name: schemes.name }).from(schemes).where(eq(schemes.workshopId, tx.workshopId))
  const plan: TakeInPlan = {
    scheme: { ...file.scheme, coats: coatsOf(file.draft.stack).length, masks: file.draft.masks.length },
    nameIsTaken: names.some(each => each.name === file.scheme.name),
    paints: planned,
    blanks: file.blanks.map(blank => here(matches.blanks, blank, ownBlanks.find(own => own.name === blank.name && sameValue(own.shape, blank.shape)))),
    masks: file.masks.map(mask => here(matches.masks, mask, ownMasks.find(own => own.name === mask.name && sameValue(own.form, mask.form)))),
    revisions: file.revisions.map(revision => revision.number),
    revisionsLeftOut: file.revisionsLeftOut,
    notes: notesOf(file, matches.buildUps),
  }
  return { matches, plan }
}

function here(found: Map<string, string>, thing: { id: string, name: string }, own: { id: string } | undefined): { name: string, is: 'here' | 'new' } {
  if (own) found.set(thing.id, own.id)
  return { name: thing.name, is: own ? 'here' : 'new' }
}

function assertUsable(paint: FilePaint, i: number): void {
  try {
    deriveOptics(paint.known)
  }
  catch (error) {
    if (!(error instanceof Problem) || error.data.code !== 'paint/unknown-colour') throw error
    throw new Problem({ code: 'input/invalid', fields: [{ path: `paints.${i}.known`, message: `“${paint.name}” gives no colour to calculate with: ${error.data.reason}` }] })
  }
}

/** What the shelf's own paint says otherwise; it stays as it is. */
function standing(paint: FilePaint, row: typeof paints.$inferSelect): string {
  const own = filePaint(row)
  const differs = (['kind', 'base', 'reducerPer100', 'filmPerPass', 'volumeSolids', 'density', 'restMinutes', 'potLifeMinutes'] as const)
    .filter(field => own[field] !== paint[field]).length > 0
  return [
    ...row.retired ? ['It is retired here.'] : [],
    ...differs ? ['The shelf says otherwise how it is thinned, laid or rested, and stays so.'] : [],
  ].join(' ')
}

function notesOf(file: SchemeFile, own: ReadonlySet<string>): string[] {
  const cut = coatsOf(file.draft.stack).some(({ laidFrom }) => laidFrom && !own.has(laidFrom.buildUpId))
  return [
    ...cut ? ['Some coats are linked to a build-up that is not in this workshop. They come in standing by themselves.'] : [],
    ...file.engineVersion === ENGINE_VERSION ? [] : [`It was written by version ${file.engineVersion} of the colour engine. New paints are worked out anew by version ${ENGINE_VERSION}; revisions keep the colours they were published with.`],
    ...file.revisionsLeftOut > 0 ? [`${file.revisionsLeftOut} older revisions had no room in the file.`] : [],
  ]
}
