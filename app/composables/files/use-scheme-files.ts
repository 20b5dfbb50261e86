import { api } from '~/composables/api/api'
import { SCHEMES_KEY } from '~/composables/scheme/scheme-keys'
import { SHELF_KEY } from '~/composables/shelf/shelf-keys'
import { fileName } from '#shared/files/file-name'
import { SCHEME_FILE_MAX } from '#shared/files/scheme-file'
import { TakenIn } from '#shared/files/take-in-plan'
import { Problem } from '#shared/errors/problem'
import { saveAs } from './save-as'

/** Schemes as files; each verb throws when it is refused. */
export interface SchemeFiles {
  /** Saves a scheme with all it is made of as a file on this device. */
  takeOut: (schemeId: string) => Promise<void>
  /** What bringing a file in would do. */
  look: (file: File) => Promise<TakenIn>
  /** Brings the file in that was looked at. */
  bringIn: (file: File, key: string) => Promise<TakenIn>
}

/** Taking schemes out and bringing them in. */
export function useSchemeFiles(): SchemeFiles {
  const headers = { 'content-type': 'application/json' }

  async function textOf(file: File): Promise<string> {
    if (file.size > SCHEME_FILE_MAX) throw new Problem({ code: 'request/too-large' })
    return file.text()
  }
  return {
    async takeOut(schemeId) {
      const file = await api('/api/schemes/:schemeId/file', { params: { schemeId } })
      saveAs(fileName(file.scheme.name, 'scheme.json'), JSON.stringify(file, null, 1), 'application/json')
    },
    async look(file) {
      return TakenIn.parse(await api('/api/schemes/file', { method: 'POST', query: { dryRun: 'true' }, body: await textOf(file), headers }))
    },
    async bringIn(file, key) {
      const taken = TakenIn.parse(await api('/api/schemes/file', { method: 'POST', body: await textOf(file), headers: { ...headers, 'idempotency-key': key } }))
      await refreshNuxtData([SCHEMES_KEY, SHELF_KEY])
      return taken
    },
  }
}
