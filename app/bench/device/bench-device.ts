import { type DBSchema, type IDBPDatabase, openDB } from 'idb'
import type { RunEvent } from '#shared/bench/run-event'
import type { RunView } from '#shared/bench/run-view'

/** Whose acts and runs these are, and in which workshop. */
export interface Owner { personId: string, workshopId: string }

/** How an act stands between this tablet and the notebook. */
export type ActStand = 'waiting' | 'handed over' | 'refused'

/** An act as it lies on the tablet. */
export interface KeptAct extends Owner {
  id: string
  runId: string
  event: RunEvent
  stand: ActStand
  /** Why it was refused; empty otherwise. */
  reason: string
}

/** A run as it lies on the tablet: everything that is needed to follow it. */
export interface KeptRun extends Owner {
  /** Person and run, so that two people on one tablet keep their own. */
  key: string
  run: RunView
  /** When it was brought here, ms on the bench's clock. */
  broughtAt: number
}

/** A photo taken at the bench that waits to be sent. */
export interface KeptPhoto extends Owner {
  id: string
  runId: string
  schemeId: string
  file: Blob
}

/** What is remembered beside acts and runs: who worked here, how far the clock is off, which timers have rung. */
export interface DeviceNotes {
  who: { person: { id: string, name: string }, workshop: { id: string, name: string } }
  clock: { offset: number }
  rung: readonly string[]
}

interface BenchSchema extends DBSchema {
  /** Under a place that grows by itself: the order in which things were done here. */
  acts: { key: number, value: KeptAct, indexes: { id: string, person: string } }
  runs: { key: string, value: KeptRun }
  photos: { key: string, value: KeptPhoto, indexes: { person: string } }
  notes: { key: string, value: DeviceNotes[keyof DeviceNotes] }
}

/** The drawers of this tablet. */
export type BenchDevice = IDBPDatabase<BenchSchema>

const NAME = 'countershade-bench'
/** Drawers by name, the private ones. */
export const PRIVATE_DRAWERS = ['acts', 'runs', 'photos', 'notes'] as const

let opened: Promise<BenchDevice> | undefined

/** The drawers, opened once a page. @throws {DOMException} where the browser keeps nothing */
export function benchDevice(): Promise<BenchDevice> {
  opened ??= openBenchDevice().catch((error: unknown) => {
    opened = undefined
    throw error
  })
  return opened
}

/** Opens the drawers under a name; another page that wants to change their form closes them. A browser that refuses at once refuses here too by the promise. */
export async function openBenchDevice(name = NAME): Promise<BenchDevice> {
  return await openDB<BenchSchema>(name, 1, {
    upgrade(device) {
      const acts = device.createObjectStore('acts', { autoIncrement: true })
      acts.createIndex('id', 'id', { unique: true })
      acts.createIndex('person', 'personId')
      device.createObjectStore('runs', { keyPath: 'key' })
      device.createObjectStore('photos', { keyPath: 'id' }).createIndex('person', 'personId')
      device.createObjectStore('notes')
    },
    blocking(_, __, event) {
      opened = undefined
      if (event.target instanceof IDBDatabase) event.target.close()
    },
    terminated() {
      opened = undefined
    },
  })
}

/** Reads one thing that is remembered. */
export async function readNote<K extends keyof DeviceNotes>(device: BenchDevice, key: K): Promise<DeviceNotes[K] | undefined> {
  // Each key only ever holds what `writeNote` put there.
  return await device.get('notes', key) as DeviceNotes[K] | undefined
}

/** Remembers one thing. */
export async function writeNote<K extends keyof DeviceNotes>(device: BenchDevice, key: K, note: DeviceNotes[K]): Promise<void> {
  await device.put('notes', note, key)
}
