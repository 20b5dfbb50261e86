import { expect, it } from 'vitest'
import { photoFileRefusal } from '#shared/photos/photo-file-check'
import { PHOTO_BYTES_MAX } from '#shared/photos/photo-limits'

it('lets a photo through up to the limit and refuses one byte more with the limit in its answer', () => {
  expect(photoFileRefusal({ size: PHOTO_BYTES_MAX, type: 'image/jpeg' })).toBeNull()
  expect(photoFileRefusal({ size: PHOTO_BYTES_MAX + 1, type: 'image/jpeg' })).toMatchObject({ code: 'photo/too-large', maxBytes: PHOTO_BYTES_MAX })
})

it('refuses what is no photo before it is sent', () => {
  expect(photoFileRefusal({ size: 900, type: 'application/pdf' })?.code).toBe('photo/not-an-image')
  expect(photoFileRefusal({ size: 900, type: 'image/svg+xml' })?.code).toBe('photo/not-an-image')
  expect(photoFileRefusal({ size: 0, type: 'image/jpeg' })?.code).toBe('photo/not-an-image')
})

it('leaves a file that gives no type for the server to read', () => {
  expect(photoFileRefusal({ size: 900, type: '' })).toBeNull()
})
