import type { SchemeBody } from '#shared/scheme/body'
import { whyNotPublishable } from '#shared/scheme/publishable'
import { coatsOf } from '#shared/scheme/stack-order'
import type { FileRevision, SchemeFile } from './scheme-file'
import type { FileFault } from './read-scheme-file'
import { revisionMaterials } from './revision-materials'

/** As much as a draft that is saved by itself may hold, letters of its JSON: one that came in larger could never be saved again. */
const DRAFT_LETTERS_MAX = 1_000_000

/** What a file of the right form still says wrong: names without a thing, things named twice, revisions that nobody could have published. */
export function schemeFileFaults(file: SchemeFile): FileFault[] {
  return [
    ...twice('paints', file.paints.map(paint => paint.id)),
    ...twice('optics', file.optics.map(optics => optics.id)),
    ...twice('blanks', file.blanks.map(blank => blank.id)),
    ...twice('masks', file.masks.map(mask => mask.id)),
    ...twice('revisions', file.revisions.map(revision => String(revision.number))),
    ...file.paints.flatMap((paint, i) => missing(file.optics, paint.opticsId, `paints.${i}.opticsId`, 'optical data')),
    ...JSON.stringify(file.draft).length > DRAFT_LETTERS_MAX ? [{ path: 'draft', message: 'The draft is larger than a draft can be saved.' }] : [],
    ...bodyFaults(file, file.draft, 'draft'),
    ...file.revisions.flatMap((revision, i) => revisionFaults(file, revision, `revisions.${i}`)),
    ...pictureFaults(file),
  ]
}

function twice(list: string, ids: readonly string[]): FileFault[] {
  return ids.flatMap((id, i) => ids.indexOf(id) < i ? [{ path: `${list}.${i}`, message: 'This stands in the file twice.' }] : [])
}

function missing(things: readonly { id: string }[], id: string, path: string, what: string): FileFault[] {
  return things.some(thing => thing.id === id) ? [] : [{ path, message: `The file names ${what} that it does not hold.` }]
}

function bodyFaults(file: SchemeFile, body: SchemeBody, path: string): FileFault[] {
  return [
    ...missing(file.blanks, body.blankId, `${path}.blankId`, 'a blank'),
    ...body.stack.flatMap((item, row) => item.act !== 'coat'
      ? []
      : item.coat.mix.parts.flatMap((part, i) => missing(file.paints, part.paintId, `${path}.stack.${row}.coat.mix.parts.${i}.paintId`, 'a paint'))),
    ...twice(`${path}.stack`, coatsOf(body.stack).map(coat => coat.id)).map(fault => ({ ...fault, path: `${path}.stack` })),
    ...body.masks.flatMap((mask, i) => mask.fromMaskId === null ? [] : missing(file.masks, mask.fromMaskId, `${path}.masks.${i}.fromMaskId`, 'a mask of the workshop')),
  ]
}

function revisionFaults(file: SchemeFile, revision: FileRevision, path: string): FileFault[] {
  const { body, materials } = revision
  const named = [
    ...bodyFaults(file, body, `${path}.body`),
    ...materials.paints.flatMap((paint, i) => [
      ...missing(file.optics, paint.opticsId, `${path}.materials.paints.${i}.opticsId`, 'optical data'),
      ...missing(file.paints, paint.id, `${path}.materials.paints.${i}.id`, 'a paint'),
    ]),
    ...materials.blank.id === body.blankId ? [] : [{ path: `${path}.materials.blank.id`, message: 'A revision is made on the blank that its body names.' }],
  ]
  return named.length > 0
    ? named
    : whyNotPublishable(body, revisionMaterials(file, revision)).map(message => ({ path: `${path}.body`, message: `A revision could not have been published like this. ${message}` }))
}

function pictureFaults(file: SchemeFile): FileFault[] {
  return file.pictures.flatMap((picture, i) => picture.of === 'draft' || file.revisions.some(revision => revision.number === picture.of)
    ? []
    : [{ path: `pictures.${i}.of`, message: 'The file shows a revision that it does not hold.' }])
}
