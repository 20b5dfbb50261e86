import { objectStore } from '#server/photos/object-store'
import { takeInPhoto } from '#server/photos/photo-pool'
import { addCard } from '#server/services/cards/add-card'
import { shareCard } from '#server/services/cards/share-card'
import { addPhoto } from '#server/services/photos/add-photo'
import { publishScheme } from '#server/services/scheme/publish-scheme'
import { testScheme } from '../scheme/ground'
import type { AccessRow, Ground, Who } from './row'
import sharp from 'sharp'

const V1 = { 'if-match': '"v1"' }
const members = (status: number): Record<Who, number> => ({ owner: status, painter: status, bench: status, desk: status, stranger: 404, signedOut: 401 })
/** Those who show finished work; the bench painter does not. */
const showers = (status: number, stranger = 404): Record<Who, number> => ({ ...members(status), bench: 403, stranger })
const anybody = (status: number): Record<Who, number> => ({ ...members(status), stranger: status, signedOut: status })

const file = () => sharp({ create: { width: 60, height: 40, channels: 3, background: 'grey' } }).jpeg().toBuffer()

async function scheme({ owner }: Ground): Promise<string> {
  const { scheme } = await testScheme(owner, { secret: 'planted coat' })
  await publishScheme(owner, scheme.id, 1, { note: 'planted coat' })
  return scheme.id
}

async function photo(ground: Ground) {
  return addPhoto(ground.owner, await scheme(ground), null, await file(), { store: objectStore(), process: takeInPhoto })
}

async function card(ground: Ground) {
  const { schemeId } = await photo(ground)
  return addCard(ground.owner, schemeId)
}

const shared = async (ground: Ground) => shareCard(ground.owner, (await card(ground)).id)

const publicAddress = async (ground: Ground, tail: (photoId: string) => string) => {
  const { link, photoIds } = await shared(ground)
  return { path: new URL(link!).pathname, tail: tail(photoIds[0]!) }
}

/** Photos, cards, and what a card's link opens to anybody. */
export const CARD_ACCESS: AccessRow[] = [
  { method: 'GET', path: '/api/schemes/[schemeId]/photos', who: members(200), make: async ground => ({ url: `/api/schemes/${await scheme(ground)}/photos` }) },
  {
    method: 'POST', path: '/api/schemes/[schemeId]/photos', who: members(201),
    make: async ground => ({ url: `/api/schemes/${await scheme(ground)}/photos`, body: await file(), headers: { 'content-type': 'image/jpeg' } }),
  },
  {
    method: 'PUT', path: '/api/schemes/[schemeId]/photos/order', who: members(200),
    make: async ground => ({ url: `/api/schemes/${await scheme(ground)}/photos/order`, body: { photoIds: [] } }),
  },
  { method: 'PUT', path: '/api/photos/[photoId]', who: members(200), make: async ground => ({ url: `/api/photos/${(await photo(ground)).id}`, body: { alt: 'left side' } }) },
  { method: 'DELETE', path: '/api/photos/[photoId]', who: showers(204), make: async ground => ({ url: `/api/photos/${(await photo(ground)).id}` }) },
  { method: 'GET', path: '/api/photos/[photoId]/[file]', who: members(200), make: async ground => ({ url: `/api/photos/${(await photo(ground)).id}/320.webp` }) },
  {
    method: 'GET', path: '/api/cards', who: showers(200, 200),
    make: async (ground) => {
      const { id } = await card(ground)
      return { url: '/api/cards', secret: [id, 'Perch in bars'] }
    },
  },
  { method: 'POST', path: '/api/cards', who: showers(201), make: async ground => ({ url: '/api/cards', body: { schemeId: await scheme(ground) } }) },
  { method: 'GET', path: '/api/cards/[cardId]', who: showers(200), make: async ground => ({ url: `/api/cards/${(await card(ground)).id}` }) },
  {
    method: 'PUT', path: '/api/cards/[cardId]', who: showers(200),
    make: async (ground) => {
      const { id, title, words, fish, sizes, price, leadTime, photoIds, showsChips } = await card(ground)
      return { url: `/api/cards/${id}`, headers: V1, body: { title, words, fish, sizes, price, leadTime, photoIds, showsChips } }
    },
  },
  { method: 'DELETE', path: '/api/cards/[cardId]', who: showers(204), make: async ground => ({ url: `/api/cards/${(await card(ground)).id}` }) },
  { method: 'POST', path: '/api/cards/[cardId]/share', who: showers(200), make: async ground => ({ url: `/api/cards/${(await card(ground)).id}/share`, body: {} }) },
  { method: 'POST', path: '/api/cards/[cardId]/colours', who: showers(200), make: async ground => ({ url: `/api/cards/${(await card(ground)).id}/colours`, body: {} }) },
  { method: 'POST', path: '/api/cards/[cardId]/revoke', who: showers(200), make: async ground => ({ url: `/api/cards/${(await shared(ground)).id}/revoke`, body: {} }) },
  {
    method: 'GET', path: '/api/cards/by-link/[token]', who: anybody(200), letsIn: true,
    make: async (ground) => {
      const { path } = await publicAddress(ground, String)
      return { url: `/api/cards/by-link/${path.slice('/c/'.length)}`, secret: ['planted coat'] }
    },
  },
  {
    method: 'GET', path: '/c/[token]/photo/[photoId]/[file]', who: anybody(200), letsIn: true,
    make: async (ground) => {
      const { path, tail } = await publicAddress(ground, id => `/photo/${id}/320.webp`)
      return { url: path + tail }
    },
  },
  {
    method: 'GET', path: '/c/[token]/preview.jpg', who: anybody(200), letsIn: true,
    make: async (ground) => {
      const { path } = await publicAddress(ground, String)
      return { url: `${path}/preview.jpg` }
    },
  },
]
