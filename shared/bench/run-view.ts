import { z } from 'zod'
import { PIECES_MAX, RunEvent } from './run-event'
import { PageQuery } from '#shared/api/page'
import { SchemeBody } from '#shared/scheme/body'
import { Materials } from '#shared/scheme/materials'
import { Painter } from '#shared/scheme/scheme-view'

const RevisionNumber = z.number().int().min(1).max(2 ** 31 - 1)

/** What starts a run: which revision, and how many pieces of it. */
export const RunStart = z.object({
  schemeId: z.uuid(),
  revision: RevisionNumber,
  pieces: z.number().int('Pieces are counted whole.').min(1, 'A run has at least one piece.').max(PIECES_MAX, `A run has at most ${PIECES_MAX} pieces.`),
})
export type RunStart = z.output<typeof RunStart>

/** Which run, from its address. */
export const RunParams = z.object({ runId: z.uuid() })
export type RunParams = z.output<typeof RunParams>

/** What one looks for: what is on the bench, or what was made. */
export const RunQuery = PageQuery.extend({ state: z.enum(['bench', 'made']).default('bench'), schemeId: z.uuid().optional() })
export type RunQuery = z.output<typeof RunQuery>

/** From which act on; those with a higher number follow. */
export const EventsQuery = z.object({ since: z.coerce.number().int().min(0).default(0) })
export type EventsQuery = z.output<typeof EventsQuery>

const RunBase = z.object({
  id: z.uuid(),
  number: z.number().int(),
  scheme: z.object({ id: z.uuid(), name: z.string() }),
  /** Number of the revision it is painted from. */
  revision: z.number().int(),
  pieces: z.number().int(),
  startedAt: z.iso.datetime(),
  startedBy: Painter.nullable(),
  finishedAt: z.iso.datetime().nullable(),
})

/** A run in a list, with where it stands. */
export const RunListItem = RunBase.extend({
  /** What is to be done now, in words; null when nothing is. */
  stands: z.string().nullable(),
  /** Steps behind the part that is furthest behind, and how many there are. */
  stepsDone: z.number().int(),
  steps: z.number().int(),
  passed: z.number().int(),
  failed: z.number().int(),
  setAside: z.number().int(),
})
export type RunListItem = z.output<typeof RunListItem>

/** A page of runs and where the next one starts. */
export const RunListPage = z.object({ items: z.array(RunListItem), next: z.string().nullable() })
export type RunListPage = z.output<typeof RunListPage>

/** An act as the server holds it: with its place in the order of arrival, and who did it. */
export const RunEventView = RunEvent.extend({ seq: z.number().int(), by: Painter.nullable() })
export type RunEventView = z.output<typeof RunEventView>

/** Acts after a place in the order of arrival. */
export const RunEventsView = z.object({
  events: z.array(RunEventView),
  /** Number of the scheme's newest revision now. */
  headNumber: z.number().int(),
  finishedAt: z.iso.datetime().nullable(),
})
export type RunEventsView = z.output<typeof RunEventsView>

/** Everything the bench needs to follow a run by itself: the frozen finish, and what was done so far. */
export const RunView = RunBase.extend({
  body: SchemeBody,
  materials: Materials,
  headNumber: z.number().int(),
  events: z.array(RunEventView),
})
export type RunView = z.output<typeof RunView>
