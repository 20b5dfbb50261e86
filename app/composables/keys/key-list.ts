import { shallowReactive } from 'vue'

/** A key and what it does. `run` gets what the place hands on with it. */
export interface Key<Given extends readonly unknown[] = []> {
  /** Any of these: "Mod+Shift+Z", "ArrowUp", " ". */
  press: readonly string[]
  /** What it does, as it stands in the list: "Undo". */
  words: string
  /** Does it; `false` leaves the key to the page. */
  run: (event: KeyboardEvent, ...given: Given) => unknown
}

/** The keys of one place, and what else leads there. */
export interface KeyPlace<Given extends readonly unknown[] = []> {
  /** Where they work: "Film section", "Compare". */
  place: string
  /** What has to hold the focus, such as "a row's handle"; absent where they work everywhere on the screen. */
  on?: string
  keys: readonly Key<Given>[]
  /** What is dragged here with a pointer, and the ways without dragging beside the keys. */
  drag?: { what: string, instead: string }
}

/** A place as the list shows it. */
export interface ListedPlace extends Omit<KeyPlace, 'keys'> { keys: readonly Pick<Key, 'press' | 'words'>[] }

/** Places on the screen now. Only a browser adds to it, when what holds the keys has come alive. */
const listed = shallowReactive(new Map<symbol, ListedPlace>())

/** Puts a place on the list; the way back takes it off again. */
export function listPlace(place: ListedPlace): () => void {
  const id = Symbol(place.place)
  listed.set(id, place)
  return () => listed.delete(id)
}

/** The places on the screen now, each once however often it stands there. */
export function placesOf(all: Iterable<ListedPlace>): ListedPlace[] {
  const once = new Map<string, ListedPlace>()
  for (const place of all) once.set(`${place.place} ${place.on ?? place.drag?.what ?? ''}`, place)
  return [...once.values()].sort((a, b) => Number(a.on !== undefined) - Number(b.on !== undefined))
}

/** What the list shows; follows what comes and goes on the screen. */
export function placesNow(): ListedPlace[] {
  return placesOf(listed.values())
}
