import { z } from 'zod'
import { BLANK_NAME_MAX } from '#shared/blank/blank-view'
import { BlankShape } from '#shared/blank/blank-shape'
import { SchemeBody } from '#shared/scheme/body'
import { MASK_NAME_MAX, MaskForm } from '#shared/scheme/mask'
import { PaintSnapshot } from '#shared/scheme/materials'
import { FISH_MAX, REVISION_NOTE_MAX, SCHEME_NAME_MAX } from '#shared/scheme/scheme-input'
import { PaintDraft } from '#shared/shelf/paint'
import { StoredOptics } from '#shared/shelf/stored-optics'

/** What a scheme file says it is. */
export const SCHEME_FILE_FORMAT = 'countershade-scheme'
/** The version this workshop writes and reads. It rises when a field changes its meaning. */
export const SCHEME_FILE_VERSION = 1
/** Largest scheme file that is taken in, bytes. */
export const SCHEME_FILE_MAX = 12 * 1024 * 1024
/** What a file that is written may weigh before the oldest revisions stay out of it, bytes: below the limit of what is taken in. */
export const SCHEME_FILE_ROOM = 10 * 1024 * 1024

const PAINTS_MAX = 400
const REVISIONS_MAX = 500
const BASE64 = /^[A-Za-z0-9+/]*={0,2}$/

/** A paint as it lies on the shelf, without what is left and what it costs; its optical data by id. */
export const FilePaint = PaintDraft.omit({ volumeLeft: true, pricePerMl: true }).extend({ id: z.uuid(), opticsId: z.uuid() })
export type FilePaint = z.output<typeof FilePaint>

/** A frozen version. Its paints name their optical data, which stand in the file once. */
export const FileRevision = z.object({
  number: z.number().int().min(1).max(1_000_000),
  note: z.string().max(REVISION_NOTE_MAX),
  publishedAt: z.iso.datetime(),
  engineVersion: z.string().min(1).max(40),
  body: SchemeBody,
  materials: z.object({
    paints: z.array(PaintSnapshot.omit({ optics: true })).max(PAINTS_MAX),
    blank: z.object({ id: z.uuid(), shape: BlankShape }),
  }),
})
export type FileRevision = z.output<typeof FileRevision>

/** The left side as our renderer drew it: for people and other programs. A workshop draws its own when it takes the file in. */
export const FilePicture = z.object({
  of: z.union([z.literal('draft'), z.number().int().min(1)]),
  side: z.literal('left'),
  type: z.literal('image/webp'),
  width: z.number().int().min(1).max(4000),
  height: z.number().int().min(1).max(4000),
  base64: z.string().max(4_000_000).regex(BASE64, 'a picture is written in base64'),
})
export type FilePicture = z.output<typeof FilePicture>

/** One scheme with everything it is made of: a file of its own. Ids are the file's own names for things; whoever takes it in gives new ones. */
export const SchemeFile = z.object({
  format: z.literal(SCHEME_FILE_FORMAT),
  version: z.literal(SCHEME_FILE_VERSION),
  engineVersion: z.string().min(1).max(40),
  scheme: z.object({ name: z.string().trim().min(1).max(SCHEME_NAME_MAX), fish: z.string().trim().max(FISH_MAX) }),
  draft: SchemeBody,
  paints: z.array(FilePaint).max(PAINTS_MAX),
  optics: z.array(z.object({ id: z.uuid(), data: StoredOptics })).max(PAINTS_MAX * 5),
  blanks: z.array(z.object({ id: z.uuid(), name: z.string().trim().min(1).max(BLANK_NAME_MAX), shape: BlankShape })).min(1).max(50),
  /** Masks of the workshop from which masks of the scheme were taken; the scheme's own copies stand in its bodies. */
  masks: z.array(z.object({ id: z.uuid(), name: z.string().trim().min(1).max(MASK_NAME_MAX), form: MaskForm })).max(400),
  /** Newest first. */
  revisions: z.array(FileRevision).max(REVISIONS_MAX),
  /** Older revisions that had no room in the file. */
  revisionsLeftOut: z.number().int().min(0).max(1_000_000),
  pictures: z.array(FilePicture).max(10),
})
export type SchemeFile = z.output<typeof SchemeFile>
