import { api } from '~/composables/api/api'
import { paintKey, SHELF_KEY } from './shelf-keys'
import type { PaintDraft } from '#shared/shelf/paint'
import { PaintChange, type PaintView } from '#shared/shelf/paint-view'

/** What can be done with paints; each throws when it is refused. */
export interface PaintActions {
  add: (draft: PaintDraft) => Promise<PaintView>
  /** `version` is the one that was read: a paint changed meanwhile is refused. */
  change: (paint: Pick<PaintView, 'id' | 'version'>, change: PaintChange) => Promise<PaintView>
  /** Retires a paint, or brings it back. */
  retire: (paint: PaintView, retired: boolean) => Promise<PaintView>
  /** The paint as it is now, past what the page holds. */
  readNow: (paintId: string) => Promise<PaintView>
}

/** Adding, changing and retiring paints. */
export function usePaintActions(): PaintActions {
  const again = (paintId: string) => refreshNuxtData([SHELF_KEY, paintKey(paintId)])

  async function change({ id, version }: Pick<PaintView, 'id' | 'version'>, wanted: PaintChange) {
    const paint = await api('/api/paints/:paintId', { params: { paintId: id }, method: 'PUT', body: wanted, headers: { 'if-match': `"v${version}"` } })
    await again(id)
    return paint
  }
  return {
    change,
    async add(draft) {
      // The key lets a request that is sent again on a bad line add one paint, not two.
      const paint = await api('/api/paints', { method: 'POST', body: draft, headers: { 'idempotency-key': crypto.randomUUID() } })
      await again(paint.id)
      return paint
    },
    retire: (paint, retired) => change(paint, { ...PaintChange.parse(paint), retired }),
    readNow: paintId => api('/api/paints/:paintId', { params: { paintId } }),
  }
}
