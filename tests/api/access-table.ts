import type { AccessRow } from './access/row'
import { BENCH_ACCESS } from './access/bench'
import { CARD_ACCESS } from './access/cards'
import { FILES_ACCESS } from './access/files'
import { PEOPLE_ACCESS } from './access/people'
import { SCHEME_ACCESS } from './access/scheme'
import { SHELF_ACCESS } from './access/shelf'
import { WALL_ACCESS } from './access/wall'

/** Every route and who gets what from it. */
export const ACCESS_TABLE: readonly AccessRow[] = [
  ...BENCH_ACCESS,
  ...PEOPLE_ACCESS,
  ...CARD_ACCESS,
  ...SCHEME_ACCESS,
  ...SHELF_ACCESS,
  ...FILES_ACCESS,
  ...WALL_ACCESS,
]
