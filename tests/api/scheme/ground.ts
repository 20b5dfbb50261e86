import { blanks, bottles, paintOptics, paints } from '#server/db/tables'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { createScheme } from '#server/services/scheme/create-scheme'
import { builtInBlank } from '#shared/blank/built-in-blanks'
import type { SchemeBody } from '#shared/scheme/body'
import type { Mask } from '#shared/scheme/mask'
import type { StoredOptics } from '#shared/shelf/stored-optics'
import { ENGINE_VERSION } from '#shared/optics/engine-version'
import { newCoat } from '#shared/scheme/new-coat'
import { newSchemeBody } from '#shared/scheme/new-scheme'
import type { SchemeView } from '#shared/scheme/scheme-view'
import type { PaintKnown } from '#shared/shelf/paint'

const OPTICS: StoredOptics = {
  engineVersion: ENGINE_VERSION, bands: 36, kind: 'film', K: Array<number>(36).fill(0.01), S: Array<number>(36).fill(0.4), how: 'masstone-hide', clipped: false,
}
const WHITE: PaintKnown = { how: 'masstone-hide', masstone: [95, -1, 2], passesToHide: 6 }

/** Puts a paint on a workshop's shelf with given optical data, and one bottle of it with 50 mL. */
export async function addTestPaint(ctx: Ctx, name = 'Opaque white, water-based', known: PaintKnown = WHITE): Promise<string> {
  return inTransaction(ctx, async (tx) => {
    const [optics] = await tx.db.insert(paintOptics).values({ workshopId: tx.workshopId, engineVersion: ENGINE_VERSION, data: OPTICS }).returning()
    const [paint] = await tx.db.insert(paints).values({
      workshopId: tx.workshopId, name, kind: 'opaque', base: 'water', known, opticsId: optics!.id, reducerPer100: 30, filmPerPass: 4,
      volumeSolids: 25, density: 1.1, restMinutes: 6, hazards: [], note: '',
    }).returning()
    await tx.db.insert(bottles).values({ workshopId: tx.workshopId, paintId: paint!.id, code: `T-${paint!.id.slice(0, 8)}`, ml: 50 })
    return paint!.id
  })
}

/** Puts a blank among a workshop's blanks. */
export async function addTestBlank(ctx: Ctx, name = 'Test minnow'): Promise<string> {
  return inTransaction(ctx, async (tx) => {
    const [blank] = await tx.db.insert(blanks).values({ workshopId: tx.workshopId, name, shape: builtInBlank('minnow-90') }).returning()
    return blank!.id
  })
}

export const MESH: Omit<Mask, 'id'> = {
  name: 'Fine net', seed: 7, fromMaskId: null,
  form: { kind: 'mesh', weave: 'hexagon', pitch: 1.6, thread: 0.2, angle: 0, stretch: 1, follow: 0.7, lift: 0.15 },
}

/** A body of two coats, the upper through a mesh; `secret` names what only recipe readers may see. */
export function testBody(blankId: string, paintId: string, secret = 'base'): SchemeBody {
  const paint = { id: paintId, name: 'Opaque white', kind: 'opaque' as const, reducerPer100: 30 }
  const maskId = crypto.randomUUID()
  return {
    ...newSchemeBody(blankId),
    stack: [
      { act: 'coat', coat: { ...newCoat(crypto.randomUUID(), paint), name: secret } },
      { act: 'fit', maskId },
      { act: 'coat', coat: { ...newCoat(crypto.randomUUID(), paint), name: 'scales', note: `note ${secret}` } },
      { act: 'lift', maskId },
    ],
    masks: [{ ...MESH, id: maskId, name: `net ${secret}` }],
  }
}

/** A scheme with two coats on a blank and a paint of its own. */
export async function testScheme(
  ctx: Ctx, { name = 'Perch in bars', fish = 'Perch', secret = 'base' } = {},
): Promise<{ scheme: SchemeView, body: SchemeBody, paintId: string, blankId: string }> {
  const blankId = await addTestBlank(ctx)
  const paintId = await addTestPaint(ctx)
  const body = testBody(blankId, paintId, secret)
  const scheme = await createScheme(ctx, { name, fish, blankId, body })
  return { scheme, body, paintId, blankId }
}

/** The same body with other passes in its first coat. */
export function withPasses(body: SchemeBody, passes: number): SchemeBody {
  const [first, ...rest] = body.stack
  return first?.act === 'coat' ? { ...body, stack: [{ act: 'coat', coat: { ...first.coat, passes } }, ...rest] } : body
}
