import type { Part } from '#shared/bench/run-parts'
import { passesOn, type RunState } from '#shared/bench/run-state'
import { countWords } from '#shared/scheme/coat-words'

/** One piece as it is shown in the batch. */
export interface PieceTile {
  piece: number
  name: string
  laid: number | null
  of: number
  as: 'open' | 'now' | 'done' | 'aside' | 'elsewhere'
  word: string
  label: string
  still: boolean
}

/** The batch at one step. */
export interface Batch {
  part: Part
  parts: readonly Part[]
  names: readonly string[]
  state: RunState
  /** The piece whose turn it is. */
  turn: number | undefined
  /** A piece is about to be chosen to set aside. */
  setting: boolean
}

/** How one piece is shown: still to do, done, elsewhere in the batch, or set aside. */
export function pieceTile(piece: number, batch: Batch): PieceTile {
  const { part, parts, state, setting, names } = batch
  const name = names[piece - 1] ?? ''
  const called = name === '' ? `Piece ${piece}` : `Piece ${piece}, ${name}`
  const bare = { piece, name, laid: null, of: 0 }
  const lay = part.step?.kind === 'lay' ? part.step : null

  const aside = state.aside.get(piece)
  if (aside !== undefined) return { ...bare, as: 'aside', word: 'aside', label: `${called}, set aside: ${aside}. Press to take it up again.`, still: false }

  const other = part.pieces.includes(piece) ? undefined : parts.find(each => each.pieces.includes(piece))
  if (other) {
    const word = other.step?.only ? 'next' : other.index > part.index ? 'ahead' : 'behind'
    const had = lay && word === 'ahead' ? passesOn(lay.coat.id, piece, state) : 0
    if (lay && had > 0) return { ...bare, laid: had, of: lay.coat.passes, as: 'done', word: '', label: `${called} is ahead, with ${countWords(had, 'pass', 'passes')} laid`, still: !setting }
    return { ...bare, as: 'elsewhere', word, label: other.step?.only ? `${called} is of another mix` : `${called} is ${word} of these`, still: !setting }
  }
  if (part.step?.kind === 'inspect') {
    const inspected = state.inspected.get(piece)
    const word = inspected ? inspected.passed ? 'passed' : 'failed' : ''
    return { ...bare, as: inspected ? 'done' : 'open', word: word || '?', label: `${called}, ${word || 'not looked at yet'}`, still: false }
  }
  if (!lay) return { ...bare, as: 'open', word: '', label: called, still: !setting }
  const [laid, of] = [passesOn(lay.coat.id, piece, state), lay.coat.passes]
  const as = laid >= of ? 'done' : piece === batch.turn ? 'now' : 'open'
  return { piece, name, laid, of, as, word: laid === of ? '' : `${laid}/${of}`, label: `${called}, ${laid} of ${countWords(of, 'pass', 'passes')} laid`, still: false }
}
