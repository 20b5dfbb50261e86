import { expect, it } from 'vitest'
import { photoSrcset } from '#shared/photos/photo-srcset'

const widths = (width: number, height: number) => photoSrcset('/p', { id: 'x', width, height }, 'webp').split(', ')

it('tells the true width of each copy, which for an upright photo is less than its long edge', () => {
  expect(widths(3000, 2000)).toEqual(['/p/x/320.webp 320w', '/p/x/640.webp 640w', '/p/x/1280.webp 1280w', '/p/x/1600.webp 1600w'])
  expect(widths(2000, 4000)[0]).toBe('/p/x/320.webp 160w')
})

it('offers no copy twice when the photo is smaller than the copies', () => {
  expect(widths(700, 500)).toEqual(['/p/x/320.webp 320w', '/p/x/640.webp 640w', '/p/x/1280.webp 700w'])
})
