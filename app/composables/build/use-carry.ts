import { nextTick, type Ref, ref } from 'vue'
import { carryWords } from './carry-words'
import type { FilmRow } from './film-rows'
import type { Build } from './use-build'
import { useKeys } from '~/composables/keys/use-keys'
import { useSpoken } from '~/composables/ui/use-spoken'

/** Carrying rows of the section by keyboard: picked up, carried row by row, laid or brought back. */
export interface Carry {
  /** Key of the row that is carried now. */
  carried: Ref<string | null>
  /** Where it lies, in words. */
  said: Ref<string>
  onKey: (event: KeyboardEvent, row: FilmRow) => void
  /** The hand left the row: it stays where it lies. */
  lay: () => void
}

/** One carry at a time for the rows of a build. */
export function useCarry(build: Build): Carry {
  const { speak } = useSpoken()
  const carried = ref<string | null>(null)
  const said = ref('')
  let steps = 0
  /** A row that moves in the page loses the focus for a moment; that is not the hand letting go. */
  let isMoving = false

  function tell(words: string) {
    said.value = words
    speak(words)
  }
  const nameOf = (row: FilmRow) => row.is === 'coat' ? `Coat ${row.number}` : `${row.mask.name}, where it is ${row.act === 'fit' ? 'fitted' : 'lifted'}`
  const place = (key: string) => build.rows.value.find(row => row.key === key)?.row ?? -1
  const where = (key: string) => carryWords(build.draft.body.value, place(key), build.draft.materials.value.paints)

  function pickUp(row: FilmRow) {
    if (build.whyNot.value) return tell(build.whyNot.value)
    // What one picks up is what one has in hand.
    if (row.is === 'coat') build.choose(row.coat.id)
    carried.value = row.key
    steps = 0
    tell(`${nameOf(row)}, picked up. ${where(row.key)}. Arrows carry it, Space lays it, Escape brings it back.`)
  }

  async function holdOn(key: string) {
    await nextTick()
    document.querySelector<HTMLElement>(`[data-carry="${key}"]`)?.focus()
    isMoving = false
  }

  function carry(row: FilmRow, way: 'up' | 'down') {
    isMoving = true
    const done = build.act(row.is === 'coat'
      ? { do: 'carry-coat', coatId: row.coat.id, way }
      : { do: 'move-item', from: row.row, to: row.row + (way === 'up' ? 1 : -1) })
    void holdOn(row.key)
    if (!done) return
    steps++
    tell(where(row.key))
  }

  function lay() {
    if (carried.value === null || isMoving) return
    const key = carried.value
    carried.value = null
    tell(`Laid. ${where(key)}`)
    said.value = ''
  }

  function bringBack(row: FilmRow) {
    isMoving = true
    void holdOn(row.key)
    for (; steps > 0; steps--) build.draft.undo()
    carried.value = null
    tell('Brought back to where it lay')
    said.value = ''
  }

  /** Only what is carried goes anywhere; otherwise the key is the page's. */
  const whileCarried = (row: FilmRow, work: () => void) => carried.value === row.key && work()
  const onKey = useKeys<[row: FilmRow]>({
    place: 'Film section', on: 'a row’s handle or an end of a mask’s bracket',
    keys: [
      {
        press: [' ', 'Enter'], words: 'Pick up, and lay',
        run(_, row) {
          if (carried.value === row.key) lay()
          else pickUp(row)
        },
      },
      { press: ['ArrowUp'], words: 'Carry one row up', run: (_, row) => whileCarried(row, () => carry(row, 'up')) },
      { press: ['ArrowDown'], words: 'Carry one row down', run: (_, row) => whileCarried(row, () => carry(row, 'down')) },
      {
        press: ['Escape'], words: 'Bring back to where it lay',
        run: (event, row) => whileCarried(row, () => {
          event.stopPropagation()
          bringBack(row)
        }),
      },
    ],
    drag: { what: 'Coats, and where masks are fitted and lifted,', instead: 'the menu of a coat and the two lists of each mask on the coat sheet' },
  })

  return { carried, said, lay, onKey }
}
