import { computed, type ComputedRef, type Ref } from 'vue'
import { api, useApi } from '~/composables/api/api'
import { orderAsWished } from '#shared/photos/order-as-wished'
import type { PhotoView } from '#shared/photos/photo-view'

/** Where a member of the workshop finds the copies of a photo. */
export const OWN_PHOTOS = '/api/photos'

/** A scheme's photos on the page, and what can be done with them; each act throws when it is refused. */
export interface Photos {
  photos: ComputedRef<readonly PhotoView[]>
  error: Ref<unknown>
  refresh: () => Promise<void>
  /** Shows a photo that has just been taken in. */
  show: (photo: PhotoView) => void
  changeAlt: (photoId: string, alt: string) => Promise<void>
  /** The new order is shown at once; refused, what is so is shown again. */
  order: (photoIds: readonly string[]) => Promise<void>
  remove: (photoId: string) => Promise<void>
}

/** Photos of a scheme, in the order they stand. */
export async function usePhotos(schemeId: string): Promise<Photos> {
  const request = useApi()
  const { data, error, refresh } = await useAsyncData(`photos ${schemeId}`, (): Promise<PhotoView[]> => request('/api/schemes/:schemeId/photos', { params: { schemeId } }), { deep: false })
  const photos = computed(() => data.value ?? [])

  return {
    photos,
    error,
    refresh: () => refresh(),
    show(photo) {
      data.value = [...photos.value.filter(other => other.id !== photo.id), photo]
    },
    async changeAlt(photoId, alt) {
      const changed = await api('/api/photos/:photoId', { params: { photoId }, method: 'PUT', body: { alt } })
      data.value = photos.value.map(photo => photo.id === photoId ? changed : photo)
    },
    async order(photoIds) {
      data.value = orderAsWished(photos.value, photoIds)
      try {
        data.value = await api('/api/schemes/:schemeId/photos/order', { params: { schemeId }, method: 'PUT', body: { photoIds } })
      }
      catch (refusal) {
        await refresh()
        throw refusal
      }
    },
    async remove(photoId) {
      await api('/api/photos/:photoId', { params: { photoId }, method: 'DELETE' })
      data.value = photos.value.filter(photo => photo.id !== photoId)
    },
  }
}
