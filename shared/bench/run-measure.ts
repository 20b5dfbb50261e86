import { z } from 'zod'
import { Piece } from './run-event'
import { Painter } from '#shared/scheme/scheme-view'
import { Lab } from '#shared/shelf/paint'

export const MEASURE_NOTE_MAX = 500
export const ZONES_MEASURED_MAX = 24

/** Mean of a patch of a photo, sRGB, 0 to 255. */
export const PatchRgb = z.tuple([z.number().min(0).max(255), z.number().min(0).max(255), z.number().min(0).max(255)])
export type PatchRgb = z.output<typeof PatchRgb>

const Zone = z.string().min(1).max(60)

/** What somebody tapped on a photo of a piece: the grey card first, then zones. */
export const RunMeasureDraft = z.object({
  piece: Piece,
  photoId: z.uuid().nullable().default(null),
  card: PatchRgb,
  zones: z.array(z.object({ zone: Zone, rgb: PatchRgb })).min(1).max(ZONES_MEASURED_MAX),
  note: z.string().trim().max(MEASURE_NOTE_MAX).default(''),
  /** Later pieces of the scheme are held against this one. */
  isSample: z.boolean().default(false),
})
export type RunMeasureDraft = z.output<typeof RunMeasureDraft>
export type RunMeasureInput = z.input<typeof RunMeasureDraft>

/** A zone as it was measured and as it was promised then; CIELAB, D65. */
export const ZoneMeasure = z.object({
  zone: Zone,
  label: z.string(),
  measured: Lab,
  /** Null where the blank has no such zone. */
  predicted: Lab.nullable(),
  /** Pearl, metallic, candy or glowing paint lies here: a photo says little of it. */
  isEffect: z.boolean(),
})
export type ZoneMeasure = z.output<typeof ZoneMeasure>

/** A zone against the promise and against the sample, CIEDE2000; null where there is nothing to hold it against. */
export const ZoneJudged = ZoneMeasure.extend({
  sample: Lab.nullable(),
  toPredicted: z.number().nullable(),
  toSample: z.number().nullable(),
  /** The distance to the sample, or else to the promise, in words of the trade. */
  words: z.string(),
})
export type ZoneJudged = z.output<typeof ZoneJudged>

/** One piece as it was measured. */
export const RunMeasureView = z.object({
  id: z.uuid(),
  piece: z.number().int(),
  photoId: z.uuid().nullable(),
  zones: z.array(ZoneJudged),
  note: z.string(),
  isSample: z.boolean(),
  by: Painter.nullable(),
  at: z.iso.datetime(),
  /** It was wrong: kept to be read, and held against nothing. */
  withdrawn: z.object({ by: Painter.nullable(), at: z.iso.datetime() }).nullable(),
})
export type RunMeasureView = z.output<typeof RunMeasureView>

/** Which measure of which run, from its address. */
export const RunMeasureParams = z.object({ runId: z.uuid(), measureId: z.uuid() })
export type RunMeasureParams = z.output<typeof RunMeasureParams>

/** The piece later ones are held against, and who said so when. */
export const SampleRecord = z.object({
  measureId: z.uuid(),
  run: z.object({ id: z.uuid(), number: z.number().int() }),
  piece: z.number().int(),
  /** The photo it was measured from. */
  photoId: z.uuid().nullable(),
  by: Painter.nullable(),
  at: z.iso.datetime(),
})
export type SampleRecord = z.output<typeof SampleRecord>
