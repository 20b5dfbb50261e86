import { writeSchemeFile } from '#server/services/files/write-scheme-file'
import { addBuildUp } from '#server/services/build-ups/change-build-up'
import { addPaint } from '#server/services/shelf/add-paint'
import { testScheme } from '../scheme/ground'
import { paintDraft } from '../shelf/ground'
import { cutOut } from '#shared/scheme/build-up-lay'
import { coatsOf } from '#shared/scheme/stack-order'
import type { AccessRow, Ground, Who } from './row'

/** Those who read recipes take files of them out. */
const readers: Record<Who, number> = { owner: 200, painter: 200, bench: 200, desk: 403, stranger: 404, signedOut: 401 }
/** Those who make them bring files in; a stranger into their own workshop. */
const makers: Record<Who, number> = { owner: 201, painter: 201, bench: 403, desk: 403, stranger: 201, signedOut: 401 }

const sequenceOf = async ({ owner }: Ground) => {
  const { body } = await testScheme(owner, { secret: 'planted coat' })
  return cutOut(body, coatsOf(body.stack).map(coat => coat.id))
}
const buildUp = async (ground: Ground) => addBuildUp(ground.owner, { name: 'Planted build-up', sequence: await sequenceOf(ground) })

/** Schemes and shelves as files, and build-ups. */
export const FILES_ACCESS: AccessRow[] = [
  {
    method: 'GET', path: '/api/schemes/[schemeId]/file', who: readers,
    make: async ({ owner }) => ({ url: `/api/schemes/${(await testScheme(owner, { secret: 'planted coat' })).scheme.id}/file`, secret: ['planted coat'] }),
  },
  {
    method: 'POST', path: '/api/schemes/file', who: makers,
    make: async ({ owner }) => ({ url: '/api/schemes/file', body: await writeSchemeFile(owner, (await testScheme(owner)).scheme.id) }),
  },
  {
    method: 'GET', path: '/api/paints/file', who: { ...readers, stranger: 200 },
    make: async ({ owner }) => {
      await addPaint(owner, paintDraft({ name: 'Planted tan' }))
      return { url: '/api/paints/file', secret: ['Planted tan'] }
    },
  },
  { method: 'POST', path: '/api/paints/file', who: makers, make: () => ({ url: '/api/paints/file', body: { csv: 'name,kind,base,known_by\r\nClear,clear,epoxy,clear\r\n' } }) },
  {
    method: 'GET', path: '/api/build-ups', who: { ...readers, stranger: 200 },
    make: async (ground) => {
      await buildUp(ground)
      return { url: '/api/build-ups', secret: ['Planted build-up', 'planted coat'] }
    },
  },
  {
    method: 'POST', path: '/api/build-ups', who: { ...makers, stranger: 404 },
    make: async ground => ({ url: '/api/build-ups', body: { name: 'New', sequence: await sequenceOf(ground) } }),
  },
  {
    method: 'PUT', path: '/api/build-ups/[buildUpId]', who: { owner: 200, painter: 200, bench: 403, desk: 403, stranger: 404, signedOut: 401 },
    make: async ground => ({ url: `/api/build-ups/${(await buildUp(ground)).id}`, headers: { 'if-match': '"v1"' }, body: { name: 'Other' } }),
  },
]
