import { draftDevice, shutDraftDevice } from './draft-device'

/** How many drafts lie on this device with work that the server does not have, of everybody who works here. */
export async function draftsOnlyHere(): Promise<number> {
  const slots = await (await draftDevice()).getAll('slots')
  return slots.filter(slot => slot.kept.isUnsaved).length
}

/** Takes every draft from this device, with its undo: recipes are nobody's business who signs in next. */
export async function emptyDrafts(): Promise<void> {
  const work = (await draftDevice()).transaction('slots', 'readwrite', { durability: 'strict' })
  await Promise.all([work.store.clear(), work.done])
}

/** Takes every draft from this device for somebody who signs out; this page keeps nothing from then on, not even as it goes away. */
export async function leaveDrafts(): Promise<void> {
  await emptyDrafts()
  shutDraftDevice()
}
