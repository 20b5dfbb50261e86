import type { DraftDevice, DraftSlot } from './draft-device'
import type { DraftTab } from './draft-tab'
import { type DraftShelf, KeptDraft } from './kept-draft'
import { readOldDraft, removeOldDraft } from './old-draft'

/** How long the undo of saved work is kept, ms; unsaved work stays for as long as it is nowhere else. */
export const UNDO_KEPT_MS = 14 * 24 * 3_600_000

/** What the shelf needs from the browser. */
export interface ShelfPorts {
  open: () => Promise<DraftDevice>
  tab: DraftTab
  personId: string
  now: () => number
  /** Where an earlier form of the application kept one draft a scheme. */
  old: Pick<Storage, 'getItem' | 'removeItem'>
}

/** Keeps drafts of one person in slots of their own for each tab. */
export function draftShelf({ open, tab, personId, now, old }: ShelfPorts): DraftShelf {
  const placeOf = (schemeId: string) => `${personId} ${schemeId}`
  const keyOf = (schemeId: string) => `${placeOf(schemeId)} ${tab.name}`
  // Checked and then left as it is: bodies that share coats go on sharing them, which keeps a long undo small.
  const readable = (slot: DraftSlot) => KeptDraft.safeParse(slot.kept).success

  async function put(device: DraftDevice, schemeId: string, kept: KeptDraft, alsoRemove: readonly string[] = []): Promise<void> {
    const work = device.transaction('slots', 'readwrite', { durability: 'strict' })
    const slot: DraftSlot = { key: keyOf(schemeId), of: placeOf(schemeId), tab: tab.name, at: now(), kept }
    const writes = [work.store.put(slot), ...alsoRemove.map(key => work.store.delete(key))]
    // Asked for at once, not when the page next comes to it: a page that goes away has said all it has to say.
    work.commit()
    await Promise.all([...writes, work.done])
  }

  /** Unsaved work of tabs that are gone, the newest first. */
  async function orphans(slots: readonly DraftSlot[]): Promise<DraftSlot[]> {
    const found: DraftSlot[] = []
    for (const slot of slots) if (slot.tab !== tab.name && slot.kept.isUnsaved && !await tab.isOpen(slot.tab)) found.push(slot)
    return found.sort((a, b) => b.at - a.at)
  }

  async function sweep(device: DraftDevice): Promise<void> {
    const work = device.transaction('slots', 'readwrite')
    for await (const place of work.store.index('at').iterate(IDBKeyRange.upperBound(now() - UNDO_KEPT_MS))) {
      if (!place.value.kept.isUnsaved) await place.delete()
    }
    await work.done
  }

  return {
    async read(schemeId) {
      const device = await open()
      await sweep(device)
      const slots = (await device.getAllFromIndex('slots', 'of', placeOf(schemeId))).filter(readable)
      const own = slots.find(slot => slot.tab === tab.name)
      if (own?.kept.isUnsaved) return own.kept
      const [orphan] = await orphans(slots)
      if (orphan) {
        // It changes hands in one act: it never lies in two slots, nor in none.
        await put(device, schemeId, orphan.kept, [orphan.key])
        return orphan.kept
      }
      const left = readOldDraft(old, personId, schemeId)
      if (left) {
        await put(device, schemeId, left)
        removeOldDraft(old, personId, schemeId)
        return left
      }
      return own?.kept ?? null
    },
    write: async (schemeId, kept) => put(await open(), schemeId, kept),
  }
}
