import { describe, expect, it } from 'vitest'
import { cleanSvg } from '#server/services/svg'

const svg = (inside: string, head = 'viewBox="0 0 40 20"') => Buffer.from(`<svg xmlns="http://www.w3.org/2000/svg" xmlns:xlink="http://www.w3.org/1999/xlink" ${head}>${inside}</svg>`)
const clean = (inside: string) => cleanSvg(svg(`<path d="M0 0H9"/>${inside}`)).bytes.toString()

describe('a drawing that comes by import', () => {
  it('keeps what draws, and its size', () => {
    const kept = cleanSvg(svg('<g stroke="#000"><path d="M0 0L9 9"/><text x="1" y="2">8 mm</text></g>'))
    expect(kept).toMatchObject({ kind: 'image/svg+xml', width: 40, height: 20 })
    expect(kept.bytes.toString()).toContain('<text x="1" y="2">8 mm</text>')
  })

  it('keeps fills and clips that name a part of the drawing itself', () => {
    expect(clean('<linearGradient id="g"><stop offset="0"/></linearGradient><rect width="4" height="4" fill="url(#g)"/>')).toContain('fill="url(#g)"')
  })

  it.each([
    ['a script', '<script>alert(1)</script>', 'script'],
    ['what runs when it is opened', '<g onload="alert(1)"><path d="M0 0"/></g>', 'onload'],
    ['an animation that sets an address', '<a href="#x"><animate attributeName="href" values="javascript:alert(1)"/><path d="M0 0"/></a>', 'javascript'],
    ['HTML inside', '<foreignObject><body xmlns="http://www.w3.org/1999/xhtml"><iframe src="x"></iframe></body></foreignObject>', 'iframe'],
    ['a picture from elsewhere', '<image href="https://elsewhere.invalid/x.png" width="4" height="4"/>', 'elsewhere'],
    ['a shape from elsewhere', '<use xlink:href="https://elsewhere.invalid/x.svg#a"/>', 'elsewhere'],
    ['a fill from elsewhere', '<rect width="4" height="4" fill="url(https://elsewhere.invalid/#g)"/>', 'elsewhere'],
    ['a style that fetches', '<style>@import "https://elsewhere.invalid/x.css"; path { fill: red }</style>', 'elsewhere'],
    ['a style attribute that fetches', '<path d="M0 0" style="fill:url(\'https://elsewhere.invalid/g\')"/>', 'elsewhere'],
    ['an address that runs', '<a xlink:href="javascript:alert(1)"><path d="M0 0"/></a>', 'javascript'],
  ])('loses %s', (_what, inside, word) => {
    const text = clean(inside)
    expect(text).toContain('M0 0H9')
    expect(text).not.toContain(word)
  })

  it.each([
    ['an entity', Buffer.from('<!DOCTYPE svg [<!ENTITY a "b">]><svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 1 1"><text>&a;</text></svg>'), /no plain SVG/],
    ['a page', Buffer.from('<html><body>hello</body></html>'), /no plain SVG/],
    ['only what is hostile', svg('<script>alert(1)</script>'), /Nothing is left/],
    ['no size', svg('<path d="M0 0"/>', ''), /viewBox/],
    ['a size that is none', svg('<path d="M0 0"/>', 'viewBox="0 0 -4 1e9"'), /viewBox/],
  ])('is refused with a sentence: %s', (_what, bytes, says) => {
    expect(() => cleanSvg(bytes)).toThrow(says)
  })
})
