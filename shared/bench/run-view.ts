import { z } from 'zod'
import { PIECES_MAX, RunEvent } from './run-event'
import { BodyMaterial } from './body-material'
import { PageQuery } from '#shared/api/page'
import { SchemeBody } from '#shared/scheme/body'
import { Materials } from '#shared/scheme/materials'
import { Painter } from '#shared/scheme/scheme-view'

const RevisionNumber = z.number().int().min(1).max(2 ** 31 - 1)

export const PIECE_NAME_MAX = 40
export const PAINTERS_MAX = 12
export const RUN_BOTTLES_MAX = 60

/** The air of the room a run is painted in. */
export const RoomAir = z.object({
  /** °C */ celsius: z.number().min(-20).max(60),
  /** Relative humidity, percent. */ humidity: z.number().min(0).max(100),
})
export type RoomAir = z.output<typeof RoomAir>

/** What starts a run: which revision, how many pieces of it, and as much of the day as somebody cares to write down. */
export const RunStart = z.object({
  schemeId: z.uuid(),
  revision: RevisionNumber,
  pieces: z.number().int('Pieces are counted whole.').min(1, 'A run has at least one piece.').max(PIECES_MAX, `A run has at most ${PIECES_MAX} pieces.`),
  /** A name for each piece; none: they are numbered from 1. */
  names: z.array(z.string().trim().min(1).max(PIECE_NAME_MAX)).max(PIECES_MAX).default([]),
  room: RoomAir.nullable().default(null),
  /** Bottles the paint comes out of, one a paint; where none is given the shelf takes the one at hand. */
  bottleIds: z.array(z.uuid()).max(RUN_BOTTLES_MAX).default([]),
  /** Colleagues who paint; none: whoever starts it. */
  painterIds: z.array(z.uuid()).max(PAINTERS_MAX).default([]),
  /** What the bodies are made of: it limits the heat. */
  madeOf: BodyMaterial.nullable().default(null),
}).refine(start => start.names.length === 0 || start.names.length === start.pieces, { path: ['names'], message: 'Name every piece, or none.' })
export type RunStart = z.output<typeof RunStart>
/** The same as somebody sends it: what is not written down is left out. */
export type RunStartInput = z.input<typeof RunStart>

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
  /** A name for each piece; empty: they are numbered. */
  names: z.array(z.string()),
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
export const RunEventView = RunEvent.extend({
  seq: z.number().int(),
  by: Painter.nullable(),
  /** When it was done on the server's clock: the tablet's time, put right by how wrong its clock was at the hand-over. */
  at: z.iso.datetime(),
})
export type RunEventView = z.output<typeof RunEventView>

/** Acts after a place in the order of arrival. */
export const RunEventsView = z.object({
  events: z.array(RunEventView),
  /** Number of the scheme's newest revision now. */
  headNumber: z.number().int(),
  finishedAt: z.iso.datetime().nullable(),
  /** The server's clock: a tablet learns from it how wrong its own is. */
  now: z.iso.datetime(),
})
export type RunEventsView = z.output<typeof RunEventsView>

/** A bottle a run may take paint from, as far as the bench must know it without a network. */
export const RunBottle = z.object({ id: z.uuid(), paintId: z.uuid(), code: z.string(), lot: z.string(), ml: z.number() })
export type RunBottle = z.output<typeof RunBottle>

/** Everything the bench needs to follow a run by itself: the frozen finish, the bottles at hand, and what was done so far. */
export const RunView = RunBase.extend({
  body: SchemeBody,
  materials: Materials,
  headNumber: z.number().int(),
  room: RoomAir.nullable(),
  /** What the bodies are made of; null where nobody said. */
  madeOf: BodyMaterial.nullable().default(null),
  /** In which form its steps are worked out: the one of the day it began. */
  stepsForm: z.union([z.literal(1), z.literal(2)]).default(1),
  painters: z.array(Painter),
  /** Which bottle each paint comes out of from the start, by the paint's id. */
  startBottles: z.record(z.uuid(), z.uuid()),
  /** Every bottle of the run's paints that is in use, and those it took from. */
  bottles: z.array(RunBottle),
  events: z.array(RunEventView),
  /** The server's clock: a tablet learns from it how wrong its own is. */
  now: z.iso.datetime(),
})
export type RunView = z.output<typeof RunView>
