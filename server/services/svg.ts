import createDOMPurify from 'dompurify'
import { JSDOM } from 'jsdom'
import type { CleanPicture } from './pictures'
import { refuse } from './refuse'

/** Drawings come by import only; this file is never part of a page or a route. */
const MOST_SVG = 2_000_000
const { window } = new JSDOM('')
const purify = createDOMPurify(window)
// Nothing in a drawing may reach outside it: an address is a fragment of its own, a style names none.
const REACHES_OUT = /url\(\s*(?!['"]?#)|@import|expression\(|javascript:/i
purify.addHook('uponSanitizeAttribute', (_node, data) => {
  if (/^(xlink:)?href$/i.test(data.attrName) ? !data.attrValue.trim().startsWith('#') : REACHES_OUT.test(data.attrValue)) data.keepAttr = false
})
purify.addHook('uponSanitizeElement', (node, data) => {
  if (data.tagName === 'style' && REACHES_OUT.test(node.textContent ?? '')) node.parentNode?.removeChild(node)
})

/** A drawing cleaned by DOMPurify's SVG profile, with its own size. 422 for what is no drawing or has none left. */
export function cleanSvg(bytes: Buffer): CleanPicture {
  if (bytes.length > MOST_SVG) refuse(413, 'This drawing is larger than 2 MB.')
  const source = bytes.toString('utf8').replace(/^\uFEFF/, '')
  if (!/<svg[\s>]/.test(source.slice(0, 4000)) || /<!ENTITY|<!DOCTYPE[^>]*\[/i.test(source)) refuse(422, 'This is no plain SVG drawing.')
  const clean = purify.sanitize(source, { USE_PROFILES: { svg: true, svgFilters: true }, FORBID_TAGS: ['image', 'feImage', 'a'], RETURN_DOM: true })
  const svg = clean.querySelector('svg')
  if (!svg || svg.children.length === 0) refuse(422, 'Nothing is left of this drawing when it is made safe.')
  svg.setAttribute('xmlns', 'http://www.w3.org/2000/svg')
  const { width, height } = sizeOf(svg)
  const text = new window.XMLSerializer().serializeToString(svg)
  return { bytes: Buffer.from(text, 'utf8'), kind: 'image/svg+xml', width, height }
}

function sizeOf(svg: Element): { width: number, height: number } {
  const box = (svg.getAttribute('viewBox') ?? '').trim().split(/[\s,]+/).map(Number)
  const [, , boxWidth, boxHeight] = box
  const side = (name: string, other: number | undefined) => Math.round(other && other > 0 ? other : Number.parseFloat(svg.getAttribute(name) ?? ''))
  const width = side('width', boxWidth)
  const height = side('height', boxHeight)
  if (!(width > 0 && height > 0 && width < 20_000 && height < 20_000)) refuse(422, 'This drawing does not say how large it is. Give it a viewBox.')
  return { width, height }
}
