import fc from 'fast-check'
import type { Ctx } from '#server/services/ctx'
import { addBlank } from '#server/services/blank/change-blank'
import { addMask } from '#server/services/blank/change-mask'
import { createScheme } from '#server/services/scheme/create-scheme'
import { publishScheme } from '#server/services/scheme/publish-scheme'
import { saveDraft } from '#server/services/scheme/save-draft'
import { addPaint } from '#server/services/shelf/add-paint'
import { builtInBlank } from '#shared/blank/built-in-blanks'
import type { SchemeBody } from '#shared/scheme/body'
import { Coat } from '#shared/scheme/coat'
import { MaskForm } from '#shared/scheme/mask'
import { Mark } from '#shared/scheme/mark'
import { newCoat } from '#shared/scheme/new-coat'
import { newSchemeBody } from '#shared/scheme/new-scheme'
import type { PaintKnown } from '#shared/shelf/paint'
import { paintDraft } from '../shelf/ground'

/** One paint of each way in which a colour can be known. */
export const KNOWN: readonly PaintKnown[] = [
  { how: 'masstone-hide', masstone: [66.25, 8, 30], passesToHide: 4 },
  { how: 'two-swatches', overBlack: [30, 4, 8], overWhite: [72, 10, 24], passes: 2 },
  { how: 'dye-over-white', overWhite: [60, 40, 30], passes: 3, haze: 0.02 },
  { how: 'flake', oxide: 'rutile', thickness: 92, flakesPerPass: 0.4, sigma: 9, edge: 0.1 },
  { how: 'fluorescent', overWhite: [88, -30, 80], passes: 3, haze: 0, emissionPeak: 515, emissionWidth: 40, quantumYield: 0.6 },
  { how: 'clear', yellowing: 0.1 },
]

/** What decides how a scheme to be carried looks: how many coats of what, whether a mask of the workshop is on, how often it was published. */
export const Carried = fc.record({
  name: fc.constantFrom('Perch in bars', 'Ühu “dämmer”', '=SUM(A1)'),
  coats: fc.array(fc.record({ paint: fc.nat(KNOWN.length - 1), passes: fc.integer({ min: 1, max: 30 }), reducer: fc.nat(40), byHand: fc.boolean(), note: fc.constantFrom('', 'wet on wet; "thin"\nslowly') }), { minLength: 1, maxLength: 4 }),
  masked: fc.boolean(),
  ownMask: fc.boolean(),
  eyes: fc.boolean(),
  revisions: fc.nat(2),
  ahead: fc.boolean(),
})
export type Carried = typeof Carried extends fc.Arbitrary<infer T> ? T : never

const NET = MaskForm.parse({ kind: 'mesh', weave: 'diamond', pitch: 1.7, thread: 0.25 })
const BY_HAND = Mark.parse({ kind: 'strokes', with: 'airbrush', strokes: [{ points: [[0.1, 0.2], [0.4, 0.25]], width: [2, 0.5], amount: [1, 0.3] }] })

/** Builds such a scheme through the services, as a painter would. */
export async function carriedScheme(ctx: Ctx, wish: Carried): Promise<string> {
  const blank = await addBlank(ctx, { name: 'Own shad', shape: builtInBlank('minnow-90') })
  const paints = await Promise.all(KNOWN.map((known, i) => addPaint(ctx, paintDraft({ name: `Paint ${i}`, known, ...i === 2 ? { potLifeMinutes: 45, twoPart: { by: 'weight' as const, resin: 100, hardener: 44 } } : {} }))))
  const net = wish.ownMask ? await addMask(ctx, { name: 'Scale net', form: NET }) : null
  const coats = wish.coats.map(({ paint, passes, reducer, byHand, note }) => Coat.parse({
    ...newCoat(crypto.randomUUID(), paints[paint]), passes, note, mix: { parts: [{ paintId: paints[paint]!.id, drops: 7 }], reducer }, marks: byHand ? [BY_HAND] : [],
  }))
  const maskId = crypto.randomUUID()
  const laid = coats.map(coat => ({ act: 'coat' as const, coat }))
  const body: SchemeBody = {
    ...newSchemeBody(blank.id),
    ...wish.eyes ? {} : { eyes: null },
    stack: wish.masked ? [{ act: 'fit', maskId }, ...laid, { act: 'lift', maskId }] : laid,
    masks: wish.masked ? [{ id: maskId, name: 'Net', form: NET, seed: 9, fromMaskId: net?.id ?? null }] : [],
    ...wish.ahead ? { answered: [`not-on-shelf ${coats[0]!.id} ${coats[0]!.mix.parts[0]!.paintId}`] } : {},
  }
  const scheme = await createScheme(ctx, { name: wish.name, fish: 'Perch', blankId: blank.id, body })
  let { version } = scheme
  for (let number = 1; number <= wish.revisions; number++) {
    await publishScheme(ctx, scheme.id, version, { note: `take ${number}` })
    const draft = { ...body, ground: { ...body.ground, name: `Sealed, ${number}` } }
    if (number < wish.revisions || wish.ahead) version = (await saveDraft(ctx, scheme.id, version, draft)).version
  }
  return scheme.id
}

const UUID = /[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}/g

/** A value whose ids are told by the order in which they first stand in it. */
export function byOrderOfIds(value: unknown): unknown {
  const seen = new Map<string, string>()
  return JSON.parse(JSON.stringify(value).replace(UUID, id => seen.get(id) ?? (seen.set(id, `id ${seen.size + 1}`), `id ${seen.size}`)))
}
