import { randomInt } from 'node:crypto'

/** Without the letters and digits that are taken for each other on a smeared label. */
const SIGNS = '23456789ABCDEFGHJKMNPQRSTVWXYZ'
const LENGTH = 8

/** A code for a bottle that has none of its own, to be written on it; two alike in a workshop are one in 10¹¹. */
export function newBottleCode(): string {
  return Array.from({ length: LENGTH }, () => SIGNS[randomInt(SIGNS.length)]).join('')
}
