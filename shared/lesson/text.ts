/** Ordinary text of a lesson: CommonMark by markdown-it with HTML off, turned into a tree. No HTML exists on the way. */
import MarkdownIt from 'markdown-it'
import type { Findings, Place } from './findings'
import type { Block, Inline } from './schema'

/** Markdown-it's tokens, as far as they are read here. */
interface Token { type: string, content: string, tag: string, info: string, meta: unknown, children: Token[] | null, attrGet(name: string): string | null, markup: string }
interface PictureToken { name: string, alt: Inline[], how: string }

const markdown = new MarkdownIt('commonmark', { html: false }).disable(['code', 'lheading', 'html_block', 'html_inline', 'heading', 'reference', 'entity'])
// Links are checked by a rule that says what is wrong; markdown-it would only leave them as text.
markdown.validateLink = () => true

markdown.inline.ruler.before('escape', 'figure', (state, silent) => {
  const { src, pos } = state
  if (src[pos] === '\\' && src[pos + 1] === '{') {
    if (!silent) state.pending += '{'
    state.pos += 2
    return true
  }
  if (src[pos] !== '{') return false
  const match = /^\{([a-z][a-z0-9_]{0,30})(?: to (\d+(?:\.\d+)?))?\}/.exec(src.slice(pos, pos + 60))
  if (!match) return false
  if (!silent) {
    const token = state.push('figure', '', 0)
    token.meta = { name: match[1], to: match[2] === undefined ? undefined : Number(match[2]) }
  }
  state.pos += match[0].length
  return true
})
markdown.inline.ruler.at('text', (state, silent) => {
  let pos = state.pos
  while (pos < state.posMax && !/[\n!#$%&*+\-:<=>@[\]^_`\\{}~]/.test(state.src[pos] ?? '')) pos++
  if (pos === state.pos) return false
  if (!silent) state.pending += state.src.slice(state.pos, pos)
  state.pos = pos
  return true
})

export interface TextPart { text: string, at: Place }
export interface ReadText { blocks: Block[], pictures: { name: string, alt: Inline[], how: string }[] }

/** Reads text into blocks; pictures are taken out of it. */
export function readText({ text, at }: TextPart, findings: Findings): ReadText {
  if (/<\/?[a-zA-Z][^>]*>|<!--/.test(withoutCode(text))) findings.add('raw-html', at, 'HTML is not used in a lesson. Write the text as it is, and \\< for the sign.')
  const pictures: PictureToken[] = []
  const tokens: Token[] = markdown.parse(text, {})
  const blocks = blocksOf(tokens, pictures, findings, at)
  return { blocks: blocks.filter(block => block.t !== 'p' || block.c.length > 0), pictures }
}

/** One line of text. */
export function readInline(text: string, findings: Findings, at: Place): Inline[] {
  const [token]: Token[] = markdown.parseInline(text, {})
  return inlinesOf(token?.children ?? [], [], findings, at)
}

/** The text with code spans and fences blanked, so that what stands in them is not looked at. Same length. */
export function withoutCode(text: string): string {
  return text.replace(/^(```|~~~)[\s\S]*?^\1[^\n]*$/gm, code => code.replace(/[^\n]/g, ' ')).replace(/(`+)(?!`)[\s\S]*?[^`]\1(?!`)/g, code => code.replace(/[^\n]/g, ' '))
}

function blocksOf(tokens: readonly Token[], pictures: PictureToken[], findings: Findings, at: Place): Block[] {
  const stack: { open: string, out: Block[], items: Block[][] }[] = [{ open: '', out: [], items: [] }]
  const top = () => stack[stack.length - 1] ?? { open: '', out: [], items: [] }
  for (const token of tokens) {
    if (/^(bullet_list|ordered_list|blockquote|list_item)_open$/.test(token.type)) stack.push({ open: token.type.replace('_open', ''), out: [], items: [] })
    else if (/^(bullet_list|ordered_list|blockquote|list_item)_close$/.test(token.type)) {
      const done = stack.pop()
      if (!done) continue
      if (done.open === 'list_item') top().items.push(done.out)
      else top().out.push(done.open === 'blockquote' ? { t: 'quote', c: done.out } : { t: done.open === 'bullet_list' ? 'ul' : 'ol', items: done.items })
    }
    else if (token.type === 'inline') top().out.push({ t: 'p', c: inlinesOf(token.children ?? [], pictures, findings, at) })
    else if (token.type === 'fence') top().out.push({ t: 'fence', v: token.content })
    else if (token.type === 'hr') top().out.push({ t: 'rule' })
  }
  return stack[0]?.out ?? []
}

interface Level { close: string, out: Inline[], wrap: (c: Inline[]) => Inline }

function inlinesOf(tokens: readonly Token[], pictures: PictureToken[], findings: Findings, at: Place): Inline[] {
  const levels: Level[] = [{ close: '', out: [], wrap: () => ({ t: 'break' }) }]
  const put = (inline: Inline) => levels[levels.length - 1]?.out.push(inline)
  for (const token of tokens) {
    switch (token.type) {
      case 'text': case 'text_special': if (token.content) put({ t: 'text', v: token.content }); break
      case 'softbreak': put({ t: 'text', v: ' ' }); break
      case 'hardbreak': put({ t: 'break' }); break
      case 'code_inline': put({ t: 'code', v: token.content }); break
      case 'figure': put(figureOf(token.meta)); break
      case 'strong_open': levels.push({ close: 'strong_close', out: [], wrap: c => ({ t: 'strong', c }) }); break
      case 'em_open': levels.push({ close: 'em_close', out: [], wrap: c => ({ t: 'em', c }) }); break
      case 'link_open': { const href = token.attrGet('href') ?? ''; levels.push({ close: 'link_close', out: [], wrap: c => linkOf(href, c, findings, at) }); break }
      case 'image': pictures.push({ name: token.attrGet('src') ?? '', alt: inlinesOf(token.children ?? [], [], findings, at), how: token.attrGet('title') ?? '' }); break
      default: if (levels.length > 1 && token.type === levels[levels.length - 1]?.close) { const done = levels.pop(); if (done) put(done.wrap(done.out)) }
    }
  }
  return merged(levels[0]?.out ?? [])
}

function figureOf(meta: unknown): Inline {
  const { name, to }: { name?: string, to?: number } = typeof meta === 'object' && meta !== null ? meta : {}
  if (name === 'clockwise' || name === 'anticlockwise') return { t: 'turning', v: name }
  return to === undefined ? { t: 'figure', name: name ?? '' } : { t: 'figure', name: name ?? '', to }
}

/** Only https, mailto, a step of this lesson or another lesson; anything else stays as its text. */
function linkOf(href: string, c: Inline[], findings: Findings, at: Place): Inline {
  if (/^(https:\/\/[^\s]+|mailto:[^\s]+|#[a-z0-9-]{1,40}|lesson:[a-z0-9-]{1,40})$/.test(href)) return { t: 'link', href, c }
  findings.add('unsafe-link', at, 'A link goes to https, mailto, a step of this lesson (#step) or another lesson (lesson:slug).')
  return c.length === 1 && c[0] ? c[0] : { t: 'strong', c }
}

function merged(list: Inline[]): Inline[] {
  const out: Inline[] = []
  for (const inline of list) {
    const last = out[out.length - 1]
    if (inline.t === 'text' && last?.t === 'text') out[out.length - 1] = { t: 'text', v: last.v + inline.v }
    else out.push(inline)
  }
  return out
}

/** Text as it would be read aloud: figures stand as their names. */
export function plainText(of: readonly (Inline | Block)[]): string {
  return of.map((part) => {
    switch (part.t) {
      case 'text': case 'code': case 'fence': return part.v
      case 'figure': return `{${part.name}}`
      case 'turning': return part.v
      case 'strong': case 'em': case 'link': case 'p': case 'quote': return plainText(part.c)
      case 'ul': case 'ol': return part.items.map(plainText).join(' ')
      default: return ' '
    }
  }).join(of[0]?.t === 'p' ? ' ' : '')
}
