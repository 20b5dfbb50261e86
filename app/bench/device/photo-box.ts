import type { BenchDevice, KeptPhoto, Owner } from './bench-device'

/** Photos taken at the bench, until the server has them. */
export interface PhotoBox {
  /** Keeps a photo; when it has returned it survives a sudden end. */
  keep: (photo: Omit<KeptPhoto, keyof Owner>) => Promise<void>
  waiting: () => Promise<KeptPhoto[]>
  drop: (photoId: string) => Promise<void>
}

/** The photos of one person in one workshop. */
export function photoBox(open: () => Promise<BenchDevice>, owner: Owner): PhotoBox {
  return {
    async keep(photo) {
      const work = (await open()).transaction('photos', 'readwrite', { durability: 'strict' })
      await Promise.all([work.store.put({ ...photo, ...owner }), work.done])
    },
    async waiting() {
      const own = await (await open()).getAllFromIndex('photos', 'person', owner.personId)
      return own.filter(photo => photo.workshopId === owner.workshopId)
    },
    drop: async photoId => (await open()).delete('photos', photoId),
  }
}
