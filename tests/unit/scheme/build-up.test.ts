import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { SchemeBody } from '#shared/scheme/body'
import { BuildUpSequence } from '#shared/scheme/build-up'
import { cutOut, idsNeeded, layInto, unlinked } from '#shared/scheme/build-up-lay'
import { changedSince, cutLink, keepAsLaid, linkCoats, linkedCoats, takeOver, underItsIds } from '#shared/scheme/build-up-link'
import { diffBodies } from '#shared/scheme/diff'
import { laidCoats } from '#shared/scheme/laid-coats'
import { coatsOf, stackFaults } from '#shared/scheme/stack-order'
import { body, coat, id, rows } from './bodies'

const fresh = (n: number, from = 0) => Array.from({ length: n }, (_, i) => `e0000000-0000-4000-8000-${String(from + i).padStart(12, '0')}`)
const LAYING = 'f0000000-0000-4000-8000-000000000001'
const ORIGIN = 'f0000000-0000-4000-8000-0000000000aa'

/** Coats and masks as they are laid, whatever they are called. */
const laidAlike = (of: Pick<SchemeBody, 'stack' | 'masks'>, ids: readonly string[]) => laidCoats(of).filter(({ coat }) => ids.includes(coat.id))
  .map(({ coat, masks }) => [{ ...unlinked(coat), id: '' }, masks.map(mask => ({ ...mask, id: '' }))])

/** Any bench order: coats with up to three masks round them, nested or crossing. */
const anyBody = fc.record({ coats: fc.integer({ min: 1, max: 7 }), spans: fc.array(fc.tuple(fc.nat(20), fc.nat(20)), { maxLength: 3 }) }).map(({ coats, spans }) => {
  const stack: (number | string)[] = Array.from({ length: coats }, (_, i) => i + 1)
  spans.forEach(([a, b], k) => {
    const [from, to] = [Math.min(a, b) % (stack.length + 1), Math.max(a, b) % (stack.length + 1)].sort((x, y) => x - y) as [number, number]
    stack.splice(to, 0, `-${k + 1}`)
    stack.splice(from, 0, `+${k + 1}`)
  })
  return body(...stack)
})
const anyChoice = anyBody.chain(of => fc.record({ of: fc.constant(of), chosen: fc.subarray(coatsOf(of.stack).map(each => each.id), { minLength: 1 }) }))

describe('coats cut out of a finish', () => {
  it('are those chosen, in order, through the same masks, and can be done at a bench', () => {
    fc.assert(fc.property(anyChoice, ({ of, chosen }) => {
      const sequence = cutOut(of, chosen)
      expect(BuildUpSequence.safeParse(sequence).success).toBe(true)
      expect(laidAlike(sequence, chosen)).toEqual(laidAlike(of, chosen))
      expect(coatsOf(sequence.stack)).toHaveLength(chosen.length)
    }))
  })

  it('laid elsewhere are the same coats under the same masks, and leave all others as they were', () => {
    fc.assert(fc.property(anyChoice, anyBody, fc.nat(30), ({ of, chosen }, into, at) => {
      const sequence = cutOut(of, chosen)
      const row = at % (into.stack.length + 1)
      const outcome = layInto(into, sequence, { row, onto: null, ids: fresh(idsNeeded(sequence)), link: null })
      if (!outcome.ok) throw new Error(outcome.because)
      const others = coatsOf(into.stack).map(each => each.id)
      expect(stackFaults(outcome.body)).toEqual(stackFaults(into))
      expect(laidAlike(outcome.body, others)).toEqual(laidAlike(into, others))
      const there = { ...outcome.body, masks: outcome.body.masks.slice(into.masks.length) }
      expect(laidAlike(there, outcome.coatIds)).toEqual(laidAlike(sequence, coatsOf(sequence.stack).map(each => each.id)))
    }))
  })

  it('take along the net they are laid through, and not the one that is on for another coat', () => {
    const sequence = cutOut(body('+1', 1, '+2', 2, '-2', 3, '-1', '+3', 4, '-3'), [id('coat', 2), id('coat', 3)])
    expect(rows(sequence)).toEqual(['+1', '+2', 2, '-2', 3, '-1'])
  })

  it('can be laid in another zone, and say so in their link', () => {
    const sequence = cutOut(body(1, 2), [id('coat', 2)])
    const outcome = layInto(body(7), sequence, { row: 1, onto: ['belly'], ids: fresh(1), link: { buildUpId: ORIGIN, edition: 1, layingId: LAYING } })
    expect(outcome).toMatchObject({ ok: true, coatIds: fresh(1), body: { stack: [{}, { coat: { where: { zones: ['belly'] }, laidFrom: { coatId: id('coat', 2), onto: ['belly'] } } }] } })
  })

  it('are refused where there is no room, in words', () => {
    const full = body(...Array.from({ length: 60 }, (_, i) => i + 1))
    expect(layInto(full, cutOut(body(1), [id('coat', 1)]), { row: 0, onto: null, ids: fresh(1), link: null })).toEqual({ ok: false, because: 'A scheme has at most 60 coats.' })
  })
})

describe('coats that are linked to a build-up', () => {
  const first = { id: ORIGIN, edition: 1, sequence: cutOut(body('+1', 1, 2, '-1'), [id('coat', 1), id('coat', 2)]) }
  const second = { ...first, edition: 2, sequence: { ...first.sequence, stack: [...first.sequence.stack, { act: 'coat' as const, coat: coat(3, { name: 'glaze' }) }] } }
  const laid = layInto(body(7, 8), first.sequence, { row: 1, onto: ['belly'], ids: fresh(3), link: { buildUpId: ORIGIN, edition: 1, layingId: LAYING } })
  if (!laid.ok) throw new Error(laid.because)

  it('are told of when it changes, and change only when it is taken over: then the same coats stay the same coats', () => {
    expect(linkedCoats(laid.body)).toEqual([{ layingId: LAYING, buildUpId: ORIGIN, edition: 1, coatIds: fresh(2) }])
    expect(changedSince(laid.body, [first])).toEqual([])
    expect(changedSince(laid.body, [second])).toMatchObject([{ laying: { layingId: LAYING }, buildUp: { edition: 2 } }])
    const taken = takeOver(laid.body, LAYING, second, fresh(4, 50))
    if (!taken.ok) throw new Error(taken.because)
    expect(coatsOf(taken.body.stack).map(each => each.id)).toEqual([id('coat', 7), ...fresh(2), fresh(1, 52)[0], id('coat', 8)])
    expect(coatsOf(taken.body.stack)[3]).toMatchObject({ name: 'glaze', where: { zones: ['belly'] }, laidFrom: { edition: 2 } })
    expect(changedSince(taken.body, [second])).toEqual([])
    expect(taken.body.masks).toEqual(laid.body.masks)
    expect(diffBodies(laid.body, taken.body)).toMatchObject({ added: [{ name: 'glaze' }], takenOut: [], moved: [], masksAdded: [], masksTakenOut: [], masksSpanned: [] })
  })

  it('taken over when nothing changed stay exactly as they are', () => {
    expect(takeOver(laid.body, LAYING, first, fresh(3, 50))).toMatchObject({ ok: true, body: laid.body })
  })

  it('stay as they are when the link is cut, and are never told of again', () => {
    const cut = cutLink(laid.body, LAYING)
    expect(changedSince(cut, [second])).toEqual([])
    expect(laidAlike(cut, fresh(2))).toEqual(laidAlike(laid.body, fresh(2)))
    expect(takeOver(cut, LAYING, second, fresh(4, 50))).toMatchObject({ ok: false })
  })

  it('kept as they were laid are told of at the next edition only', () => {
    const kept = keepAsLaid(laid.body, LAYING, 2)
    expect(changedSince(kept, [second])).toEqual([])
    expect(changedSince(kept, [{ ...second, edition: 3 }])).toHaveLength(1)
  })

  it('keep other coats\' masks when they are taken over', () => {
    const wider = { ...laid.body, stack: [laid.body.stack[1]!, laid.body.stack[0]!, ...laid.body.stack.slice(2)] }
    const taken = takeOver(wider, LAYING, second, fresh(4, 50))
    expect(taken.ok && taken.body.masks.length).toBe(2)
  })

  it('saved back into it are known there by its own ids', () => {
    const again = underItsIds(cutOut(laid.body, laid.coatIds), laid.body, ORIGIN)
    expect(coatsOf(again.stack).map(each => each.id)).toEqual([id('coat', 1), id('coat', 2)])
    const linked = linkCoats(body('+1', 1, 2, '-1', 5), first, LAYING)
    expect(linkedCoats(linked)).toEqual([{ layingId: LAYING, buildUpId: ORIGIN, edition: 1, coatIds: [id('coat', 1), id('coat', 2)] }])
  })
})
