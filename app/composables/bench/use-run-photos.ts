import { onBeforeUnmount, onMounted, type Ref, shallowRef } from 'vue'
import type { RunHere } from './use-run-here'
import { api } from '~/composables/api/api'
import { OWN_PHOTOS } from '~/composables/photos/use-photos'
import { RUN_PHOTO_EDGE, runPhotoShelf } from '~/bench/device/run-photos'
import { photosToBring } from '#shared/bench/photos-to-bring'
import { RunReport } from '#shared/bench/run-report'
import { photoAddress } from '#shared/photos/photo-srcset'

/** No answer within this time counts as no network, ms. */
const PATIENCE_MS = 15_000

/** A photo to hold a piece against, as a page shows it. */
export interface RunPhotoShown { id: string, words: string, source: string }

/** Photos of a run's finish on this tablet; `brought` ends once they are here, or cannot be had. */
export interface RunPhotos { photos: Readonly<Ref<readonly RunPhotoShown[]>>, brought: Promise<void> }

/** Puts the photos of a run's finish on the tablet when it is opened, and shows them with or without a network. */
export function useRunPhotos({ run, owner }: Pick<RunHere, 'run' | 'owner'>): RunPhotos {
  const photos = shallowRef<readonly RunPhotoShown[]>([])
  const shelf = 'caches' in window ? runPhotoShelf(owner, run.id) : null
  let isGone = false
  let settle: () => void = () => undefined
  const brought = new Promise<void>((resolve) => {
    settle = resolve
  })

  function show(found: readonly RunPhotoShown[]): void {
    for (const { source } of photos.value) URL.revokeObjectURL(source)
    photos.value = found
  }

  async function look(): Promise<void> {
    const kept = await shelf?.read() ?? []
    if (!isGone) show(kept.map(({ note, file }) => ({ ...note, source: URL.createObjectURL(file) })))
  }

  async function bring(): Promise<void> {
    const [all, report] = await Promise.all([
      api('/api/schemes/:schemeId/photos', { params: { schemeId: run.scheme.id }, timeout: PATIENCE_MS, retry: 0 }),
      api('/api/runs/:runId/report', { params: { runId: run.id }, timeout: PATIENCE_MS, retry: 0 }),
    ])
    const { sample } = RunReport.parse(report)
    await shelf?.bring(photosToBring(all, run.id, sample?.photoId ?? null), async (photoId) => {
      const answer = await fetch(photoAddress(OWN_PHOTOS, photoId, RUN_PHOTO_EDGE, 'webp'), { signal: AbortSignal.timeout(PATIENCE_MS) })
      if (!answer.ok) throw new TypeError('The photo cannot be had')
      return answer.blob()
    })
    await look()
  }

  onMounted(async () => {
    try {
      await look()
      await bring()
    }
    catch {
      // Without a network what lies here is shown; a run can be painted without any photo.
    }
    finally {
      settle()
    }
  })
  onBeforeUnmount(() => {
    isGone = true
    show([])
  })
  return { photos, brought }
}
