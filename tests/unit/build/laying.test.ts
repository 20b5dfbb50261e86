import { describe, expect, it } from 'vitest'
import { layingRows } from '~/composables/build-up/laying-rows'
import { whyNotLaid } from '~/composables/build-up/why-not-laid'
import { body, paint } from '../scheme/bodies'

describe('where coats can be laid', () => {
  it('is told from the top down, with the masks that are on there', () => {
    expect(layingRows(body(1, '+1', 2, '-1'))).toEqual([
      { value: 4, label: 'on top, over coat 2, after “Mask 1” is lifted' },
      { value: 3, label: 'over coat 2, through “Mask 1”' },
      { value: 1, label: 'over coat 1' },
      { value: 0, label: 'on the ground' },
    ])
  })

  it('on a bare blank is the ground', () => {
    expect(layingRows(body())).toEqual([{ value: 0, label: 'on the ground' }])
  })
})

describe('coats whose paint is put away', () => {
  it('cannot be laid, and say which paint to bring back', () => {
    expect(whyNotLaid(body(1), { paints: [] }, [paint(1)])).toBe('Bring “Paint 1” back to the shelf first.')
    expect(whyNotLaid(body(1), { paints: [paint(1)] }, [])).toBeUndefined()
  })
})
