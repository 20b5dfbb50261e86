import { describe, expect, it } from 'vitest'
import { comparison, comparisonWords } from '~/composables/build/compare-rows'
import { body, paint } from '../scheme/bodies'

const materials = { paints: [paint(1)] }
const two = (from: ReturnType<typeof body>, to: ReturnType<typeof body>) => comparison({ from: { body: from, materials }, to: { body: to, materials } })

describe('two versions side by side', () => {
  it('link the coats that both have, and say what became of the others', () => {
    const both = two(body(1, 2, 3), body(1, 3, 4))
    expect(both.from.map(each => each.fate)).toEqual(['same', 'taken out', 'same'])
    expect(both.to.map(each => each.fate)).toEqual(['added', 'same', 'same'])
    expect(both.links.map(link => [link.from, link.to])).toEqual([[0, 1], [2, 2]])
    expect(comparisonWords(both)).toBe('Coats: 1 taken out, 1 added, 2 as they were.')
  })

  it('say how many passes a coat has now', () => {
    const later = body(1, 2)
    later.stack = later.stack.map((item, i) => i === 1 && item.act === 'coat' ? { act: 'coat', coat: { ...item.coat, passes: item.coat.passes + 1 } } : item)
    const both = two(body(1, 2), later)
    expect(both.links.find(link => link.fate === 'changed')?.words).toBe('3 to 4 passes')
  })

  it('say that a coat was moved', () => {
    expect(two(body(1, 2, 3), body(3, 1, 2)).links.filter(link => link.fate === 'moved')).toHaveLength(1)
  })
})
