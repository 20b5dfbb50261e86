import type { SchemeBody, StackItem } from '#shared/scheme/body'
import type { Coat } from '#shared/scheme/coat'
import { unlinked } from '#shared/scheme/build-up-lay'

/** Which thing of a workshop each name of a file stands for. */
export interface NewIds {
  paints: ReadonlyMap<string, string>
  blanks: ReadonlyMap<string, string>
  masks: ReadonlyMap<string, string>
  /** Build-ups the workshop has: a link to any other is cut. */
  buildUps: ReadonlySet<string>
}

/**
 * A body that names the things of another workshop. Coats and masks keep their ids: those last as long as the scheme and its forks,
 * and the grain of each coat is drawn from its id.
 */
export function bodyWithIds(body: SchemeBody, ids: NewIds): SchemeBody {
  const renamed = new Map([...ids.paints, ...ids.blanks, ...ids.masks])
  const item = (each: StackItem): StackItem => each.act === 'coat' ? { act: 'coat', coat: coatWithIds(each.coat, ids) } : each
  return {
    ...body,
    blankId: ids.blanks.get(body.blankId) ?? body.blankId,
    stack: body.stack.map(item),
    masks: body.masks.map(mask => ({ ...mask, fromMaskId: mask.fromMaskId === null ? null : ids.masks.get(mask.fromMaskId) ?? null })),
    // A warning that was answered names what it was about.
    ...body.answered ? { answered: body.answered.map(key => key.split(' ').map(word => renamed.get(word) ?? word).join(' ')) } : {},
  }
}

function coatWithIds(coat: Coat, { paints, buildUps }: NewIds): Coat {
  return {
    ...coat.laidFrom && !buildUps.has(coat.laidFrom.buildUpId) ? unlinked(coat) : coat,
    mix: { ...coat.mix, parts: coat.mix.parts.map(part => ({ ...part, paintId: paints.get(part.paintId) ?? part.paintId })) },
  }
}
