import { type DBSchema, type IDBPDatabase, openDB } from 'idb'
import type { KeptDraft } from './kept-draft'

/** A draft in its slot: whose it is, of which scheme, and the tab that keeps it. */
export interface DraftSlot {
  /** Person, scheme and tab: two tabs never share a slot. */
  key: string
  /** Person and scheme. */
  of: string
  tab: string
  /** When it was written, ms. */
  at: number
  kept: KeptDraft
}

interface DraftSchema extends DBSchema {
  slots: { key: string, value: DraftSlot, indexes: { of: string, at: number } }
}

/** The drawer of drafts of this browser. */
export type DraftDevice = IDBPDatabase<DraftSchema>

const NAME = 'countershade-drafts'
let opened: Promise<DraftDevice> | undefined
let isShut = false

/** Nothing more is kept by this page: whoever worked on it signs out. */
export function shutDraftDevice(): void {
  isShut = true
}

/** The drawer, opened once a page. @throws {DOMException} where the browser keeps nothing, or when it was shut */
export async function draftDevice(): Promise<DraftDevice> {
  if (isShut) throw new DOMException('The drafts of this page were taken from the device.', 'InvalidStateError')
  opened ??= openDraftDevice().catch((error: unknown) => {
    opened = undefined
    throw error
  })
  return opened
}

/** Opens the drawer under a name; another page that wants to change its form closes it. */
export function openDraftDevice(name = NAME): Promise<DraftDevice> {
  return openDB<DraftSchema>(name, 1, {
    upgrade(device) {
      const slots = device.createObjectStore('slots', { keyPath: 'key' })
      slots.createIndex('of', 'of')
      slots.createIndex('at', 'at')
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
