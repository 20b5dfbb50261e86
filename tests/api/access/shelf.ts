import { addBlank } from '#server/services/blank/change-blank'
import { addMask } from '#server/services/blank/change-mask'
import { addBottle } from '#server/services/shelf/change-bottle'
import { addPaint } from '#server/services/shelf/add-paint'
import { BottleDraft } from '#shared/shelf/bottle'
import { builtInBlank } from '#shared/blank/built-in-blanks'
import { MaskForm } from '#shared/scheme/mask'
import { paintDraft } from '../shelf/ground'
import type { AccessRow, Ground, Who } from './row'

const V1 = { 'if-match': '"v1"' }
const BOTTLE = BottleDraft.parse({ lot: 'Planted lot', ml: 30 })
const SECRET = ['Planted tan', 'Planted lot', 'Planted blank', 'Planted net']
const PAINT = paintDraft({ name: 'Planted tan' })
const BLANK = { name: 'Planted blank', shape: builtInBlank('minnow-90') }
const MASK = { name: 'Planted net', form: MaskForm.parse({ kind: 'mesh', weave: 'square', pitch: 2, thread: 0.3 }) }

type Statuses = Record<Who, number>
/** A list answers a stranger with their own, which is empty. */
const lists = (desk: number): Statuses => ({ owner: 200, painter: 200, bench: 200, desk, stranger: 200, signedOut: 401 })
const reads = (desk: number): Statuses => ({ owner: 200, painter: 200, bench: 200, desk, stranger: 404, signedOut: 401 })
/** A stranger adds to their own workshop. */
const adds: Statuses = { owner: 201, painter: 201, bench: 403, desk: 403, stranger: 201, signedOut: 401 }
const changes: Statuses = { owner: 200, painter: 200, bench: 403, desk: 403, stranger: 404, signedOut: 401 }

const addressOf = {
  paint: async ({ owner }: Ground) => `/api/paints/${(await addPaint(owner, PAINT)).id}`,
  blank: async ({ owner }: Ground) => `/api/blanks/${(await addBlank(owner, BLANK)).id}`,
  bottles: async ({ owner }: Ground) => {
    const { id } = await addPaint(owner, PAINT)
    await addBottle(owner, id, BOTTLE)
    return `/api/paints/${id}/bottles`
  },
  bottle: async ({ owner }: Ground) => `/api/bottles/${(await addBottle(owner, (await addPaint(owner, PAINT)).id, BOTTLE)).id}`,
  mask: async ({ owner }: Ground) => `/api/masks/${(await addMask(owner, MASK)).id}`,
}

function get(path: string, who: Statuses, thing: keyof typeof addressOf, tail: (address: string) => string): AccessRow {
  return { method: 'GET', path, who, make: async ground => ({ url: tail(await addressOf[thing](ground)), secret: SECRET }) }
}
const listOf = (address: string) => address.slice(0, address.lastIndexOf('/'))
const itself = (address: string) => address

/** The shelf, the blanks and the masks. */
export const SHELF_ACCESS: AccessRow[] = [
  get('/api/paints', lists(403), 'paint', listOf),
  get('/api/paints/[paintId]', reads(403), 'paint', itself),
  get('/api/paints/[paintId]/uses', reads(403), 'paint', address => `${address}/uses`),
  get('/api/paints/[paintId]/bottles', reads(403), 'bottles', itself),
  get('/api/bottles', lists(403), 'bottle', listOf),
  get('/api/blanks', lists(200), 'blank', listOf),
  get('/api/blanks/[blankId]', reads(200), 'blank', itself),
  get('/api/masks', lists(403), 'mask', listOf),
  { method: 'POST', path: '/api/paints', who: adds, make: () => ({ url: '/api/paints', body: { ...PAINT, name: 'New' } }) },
  { method: 'POST', path: '/api/blanks', who: adds, make: () => ({ url: '/api/blanks', body: { ...BLANK, name: 'New' } }) },
  { method: 'POST', path: '/api/masks', who: adds, make: () => ({ url: '/api/masks', body: { ...MASK, name: 'New' } }) },
  {
    method: 'PUT', path: '/api/paints/[paintId]', who: changes,
    make: async ground => ({ url: await addressOf.paint(ground), headers: V1, body: { ...PAINT, name: 'Other' } }),
  },
  {
    method: 'POST', path: '/api/paints/[paintId]/bottles', who: { ...adds, stranger: 404 },
    make: async ground => ({ url: await addressOf.bottles(ground), body: BOTTLE }),
  },
  {
    method: 'PUT', path: '/api/bottles/[bottleId]', who: changes,
    make: async ground => ({ url: await addressOf.bottle(ground), headers: V1, body: { ...BOTTLE, lot: 'Other' } }),
  },
  {
    method: 'PUT', path: '/api/blanks/[blankId]', who: changes,
    make: async ground => ({ url: await addressOf.blank(ground), headers: V1, body: { ...BLANK, name: 'Other' } }),
  },
  {
    method: 'PUT', path: '/api/masks/[maskId]', who: changes,
    make: async ground => ({ url: await addressOf.mask(ground), headers: V1, body: { ...MASK, name: 'Other' } }),
  },
]
