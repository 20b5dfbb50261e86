import { saveSearch } from '#server/services/scheme/saved-searches'
import { WallWish } from '#shared/scheme/wall/wall-wish'
import { testScheme } from '../scheme/ground'
import type { AccessRow, Who } from './row'

const everybody = (status: number): Record<Who, number> => ({ owner: status, painter: status, bench: status, desk: status, stranger: status, signedOut: 401 })
const SEARCH = { name: 'planted search', wish: WallWish.parse({ words: 'planted' }) }

/** The wall: what it can be narrowed by, searches that are kept, putting away. */
export const WALL_ACCESS: AccessRow[] = [
  {
    method: 'GET', path: '/api/schemes/choices', who: everybody(200),
    make: async ({ owner }) => {
      await testScheme(owner, { fish: 'planted fish' })
      return { url: '/api/schemes/choices', secret: ['planted fish'] }
    },
  },
  {
    // A stranger puts nothing away: each of the chosen is gone to them.
    method: 'POST', path: '/api/schemes/put-away', who: { ...everybody(200), bench: 403, desk: 403 },
    make: async ({ owner }) => ({ url: '/api/schemes/put-away', body: { ids: [(await testScheme(owner)).scheme.id], away: true }, secret: ['Perch in bars'] }),
  },
  {
    method: 'GET', path: '/api/saved-searches', who: everybody(200),
    make: async ({ owner }) => {
      await saveSearch(owner, SEARCH)
      return { url: '/api/saved-searches', secret: [SEARCH.name] }
    },
  },
  { method: 'POST', path: '/api/saved-searches', who: everybody(201), make: () => ({ url: '/api/saved-searches', body: SEARCH }) },
  {
    method: 'DELETE', path: '/api/saved-searches/[searchId]', who: everybody(204),
    make: async ({ owner }) => ({ url: `/api/saved-searches/${(await saveSearch(owner, SEARCH)).id}` }),
  },
]
