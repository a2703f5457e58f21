import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { PICTURE_NAME } from '#shared/schemas/lessons'
import { pictureName } from '~/utils/author/picture-name'

describe('the name a picture gets', () => {
  it.each([['IMG 2041 (1).JPG', 'img-2041-1.jpg'], ['../../etc/passwd', 'passwd'], ['C:\\photos\\Biegung é.png', 'biegung-e.png'], ['.jpg', 'jpg'], ['銀.webp', 'picture.webp'], ['', 'picture']])('of %j is %j', (given, name) => {
    expect(pictureName(given)).toBe(name)
  })

  it('is plain, whatever the file is called', () => {
    fc.assert(fc.property(fc.string({ unit: 'binary' }), (given) => {
      expect(pictureName(given)).toMatch(PICTURE_NAME)
    }))
  })
})
