/** A lesson's text without its marks, where only plain words can stand. */
import type { Block, Inline } from './schema'

/** The words of a line. A figure stands as its name in braces unless `figure` says how it reads. */
export function plainText(line: readonly Inline[], figure: (name: string, to?: number) => string = name => `{${name}}`): string {
  return line.map((part) => {
    switch (part.t) {
      case 'text': case 'code': case 'turning': return part.v
      case 'figure': return figure(part.name, part.to)
      case 'break': return ' '
      case 'strong': case 'em': case 'link': return plainText(part.c, figure)
    }
    return ''
  }).join('')
}

/** The words of some paragraphs, one space between them. */
export function plainBlocks(blocks: readonly Block[], figure?: (name: string, to?: number) => string): string {
  return blocks.map((block) => {
    switch (block.t) {
      case 'p': return plainText(block.c, figure)
      case 'ul': case 'ol': return block.items.map(item => plainBlocks(item, figure)).join(' ')
      case 'quote': return plainBlocks(block.c, figure)
      case 'fence': return block.v
      case 'rule': return ''
    }
    return ''
  }).filter(text => text !== '').join(' ')
}
