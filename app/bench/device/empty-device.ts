import { benchDevice, PRIVATE_DRAWERS, readNote } from './bench-device'

/** How much on this tablet nobody else has: acts and photos that were not handed over, of everybody who works here. */
export async function onlyHere(): Promise<number> {
  const device = await benchDevice()
  const acts = (await device.getAll('acts')).filter(act => act.stand === 'waiting').length
  return acts + await device.count('photos')
}

/** Empties everything private from this tablet. The application itself stays: there is nothing of anybody in it. */
export async function emptyDevice(): Promise<void> {
  const device = await benchDevice()
  const clock = await readNote(device, 'clock')
  const work = device.transaction(PRIVATE_DRAWERS, 'readwrite', { durability: 'strict' })
  await Promise.all([...PRIVATE_DRAWERS.map(drawer => work.objectStore(drawer).clear()), work.done])
  // How far the clock is off is nobody's secret.
  if (clock) await device.put('notes', clock, 'clock')
  await Promise.all((await caches.keys()).filter(name => name.startsWith(PRIVATE_CACHES)).map(name => caches.delete(name)))
}

/** Photos of a run's finish lie in caches of this name. */
export const PRIVATE_CACHES = 'countershade-private-'
