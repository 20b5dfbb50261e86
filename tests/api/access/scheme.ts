import { publishScheme } from '#server/services/scheme/publish-scheme'
import { addTestBlank, testScheme } from '../scheme/ground'
import type { AccessRow, Ground, Who } from './row'

const SECRET = ['Perch in bars', 'planted coat']
const TAB = '00000000-0000-4000-8000-0000000000aa'
const V1 = { 'if-match': '"v1"' }

/** Those who read recipes; the front desk may not, a stranger finds nothing. */
const readers = (status: number): Record<Who, number> => ({ owner: status, painter: status, bench: status, desk: 403, stranger: 404, signedOut: 401 })
/** Those who make them. */
const makers = (status: number, stranger = 404): Record<Who, number> => ({ owner: status, painter: status, bench: 403, desk: 403, stranger, signedOut: 401 })

async function published({ owner }: Ground) {
  const { scheme, body } = await testScheme(owner, { secret: 'planted coat' })
  await publishScheme(owner, scheme.id, 1, { note: 'planted coat' })
  return { url: `/api/schemes/${scheme.id}`, body }
}

const get = (path: string, tail: string, who: Record<Who, number>): AccessRow => ({
  method: 'GET', path, who, make: async ground => ({ url: `${(await published(ground)).url}${tail}`, secret: SECRET }),
})

/** Schemes, drafts, revisions and their pictures. */
export const SCHEME_ACCESS: AccessRow[] = [
  {
    method: 'GET', path: '/api/schemes', who: { owner: 200, painter: 200, bench: 200, desk: 200, stranger: 200, signedOut: 401 },
    make: async (ground) => {
      await published(ground)
      return { url: '/api/schemes', secret: SECRET }
    },
  },
  {
    method: 'POST', path: '/api/schemes', who: makers(201),
    make: async ({ owner }) => ({ url: '/api/schemes', body: { name: 'New', blankId: await addTestBlank(owner) } }),
  },
  get('/api/schemes/[schemeId]', '', readers(200)),
  get('/api/schemes/[schemeId]/look', '/look', { ...readers(200), desk: 200 }),
  get('/api/schemes/[schemeId]/materials', '/materials', readers(200)),
  get('/api/schemes/[schemeId]/revisions', '/revisions', readers(200)),
  get('/api/schemes/[schemeId]/revisions/[number]', '/revisions/1', readers(200)),
  {
    method: 'GET', path: '/api/schemes/[schemeId]/compare', who: readers(200),
    make: async (ground) => {
      const { url } = await published(ground)
      const { scheme } = await testScheme(ground.owner, { name: 'Another, beside it' })
      return { url: `${url}/compare?from=1&other=${scheme.id}`, secret: SECRET }
    },
  },
  get('/api/schemes/[schemeId]/picture', '/picture?width=32&upTo=ground', readers(200)),
  get('/api/schemes/[schemeId]/live', `/live?tab=${TAB}`, readers(200)),
  {
    method: 'POST', path: '/api/schemes/[schemeId]/here', who: readers(204),
    make: async ground => ({ url: `${(await published(ground)).url}/here`, body: { tab: TAB, coatId: null } }),
  },
  {
    method: 'PATCH', path: '/api/schemes/[schemeId]', who: makers(200),
    make: async ground => ({ url: (await published(ground)).url, headers: V1, body: { name: 'Another' } }),
  },
  {
    method: 'PUT', path: '/api/schemes/[schemeId]/draft', who: makers(200),
    make: async (ground) => {
      const { url, body } = await published(ground)
      return { url: `${url}/draft`, headers: V1, body: { body } }
    },
  },
  {
    method: 'POST', path: '/api/schemes/[schemeId]/revisions', who: makers(201),
    make: async ({ owner }) => ({ url: `/api/schemes/${(await testScheme(owner)).scheme.id}/revisions`, headers: V1, body: { note: '' } }),
  },
  {
    method: 'POST', path: '/api/schemes/[schemeId]/restore', who: makers(200),
    make: async ground => ({ url: `${(await published(ground)).url}/restore`, headers: V1, body: { number: 1 } }),
  },
  {
    method: 'POST', path: '/api/schemes/[schemeId]/fork', who: makers(201),
    make: async ground => ({ url: `${(await published(ground)).url}/fork`, body: { name: 'Another', number: 1 } }),
  },
]
