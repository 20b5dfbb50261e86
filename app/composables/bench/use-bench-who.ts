import { benchDevice, type DeviceNotes, type Owner, readNote, writeNote } from '~/bench/device/bench-device'
import { useSession } from '~/composables/people/use-session'

/** Who works at this tablet, and how that is known. */
export type BenchWho
  = | { kind: 'known', who: DeviceNotes['who'], isSignedIn: boolean }
    /** Nobody is signed in, and nobody was. */
    | { kind: 'nobody' }
    /** There is no network, and nobody worked here before. */
    | { kind: 'no network' }

/** Longer than this nobody waits for the server to say who is signed in, ms. */
const PATIENCE_MS = 4_000

/** Asks who is signed in; without a network, or when the sign-in has ended, it is whoever worked here last. Only in a browser. */
export async function whoIsHere(): Promise<BenchWho> {
  const { session, refresh } = useSession()
  const asked = await Promise.race([
    refresh().then(() => 'answered' as const, () => 'no network' as const),
    new Promise<'no network'>(resolve => window.setTimeout(() => resolve('no network'), PATIENCE_MS)),
  ])
  const person = session.value?.person
  const workshop = session.value?.workshop
  if (asked === 'answered' && person && workshop) {
    const who = { person: { id: person.id, name: person.name }, workshop: { id: workshop.id, name: workshop.name } }
    await benchDevice().then(device => writeNote(device, 'who', who)).catch(() => undefined)
    return { kind: 'known', who, isSignedIn: true }
  }
  const remembered = await benchDevice().then(device => readNote(device, 'who')).catch(() => undefined)
  if (remembered) return { kind: 'known', who: remembered, isSignedIn: asked === 'no network' }
  return { kind: asked === 'answered' ? 'nobody' : 'no network' }
}

/** Whose acts these are. */
export function ownerOf(who: DeviceNotes['who']): Owner {
  return { personId: who.person.id, workshopId: who.workshop.id }
}
