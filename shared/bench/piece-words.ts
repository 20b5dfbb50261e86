import { countWords, listWords } from '#shared/scheme/coat-words'

function ranges(pieces: readonly number[]): [first: number, last: number][] {
  const found: [number, number][] = []
  for (const piece of [...new Set(pieces)].sort((a, b) => a - b)) {
    const last = found.at(-1)
    if (last && last[1] === piece - 1) last[1] = piece
    else found.push([piece, piece])
  }
  return found
}

/** Pieces in a sentence: "1 to 7", "8", "3, 5 and 8 to 11". */
export function piecesWords(pieces: readonly number[]): string {
  return listWords(ranges(pieces).flatMap(([first, last]) => first === last ? [`${first}`] : last === first + 1 ? [`${first}`, `${last}`] : [`${first} to ${last}`]))
}

/** Pieces in little room, with their noun: "piece 8", "pieces 1–4, 6". */
export function piecesLabel(pieces: readonly number[]): string {
  const figures = ranges(pieces).map(([first, last]) => first === last ? `${first}` : `${first}–${last}`).join(', ')
  return `${pieces.length === 1 ? 'piece' : 'pieces'} ${figures}`
}

const NUMBERS = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten', 'eleven', 'twelve'] as const

/** A small count in letters, a larger one in figures: "four", "13". */
export function countInLetters(count: number): string {
  return NUMBERS[count] ?? String(count)
}

/** A length of time as one says it: "40 seconds", "6 minutes", "1 hour 30 minutes", "2 days". */
export function durationWords(seconds: number): string {
  if (seconds < 90) return countWords(Math.round(seconds), 'second')
  const minutes = Math.round(seconds / 60)
  if (minutes < 90) return countWords(minutes, 'minute')
  const hours = Math.floor(minutes / 60)
  if (hours >= 48) return countWords(Math.round(hours / 24), 'day')
  return [countWords(hours, 'hour'), ...minutes % 60 > 0 ? [countWords(minutes % 60, 'minute')] : []].join(' ')
}

/** A running time: "2:10", "1:05:00". */
export function clockWords(milliseconds: number): string {
  const seconds = Math.ceil(milliseconds / 1000)
  const [hours, minutes] = [Math.floor(seconds / 3600), Math.floor(seconds / 60) % 60]
  const two = (value: number) => String(value).padStart(2, '0')
  return hours > 0 ? `${hours}:${two(minutes)}:${two(seconds % 60)}` : `${minutes}:${two(seconds % 60)}`
}
