/** Lesson text as plain words, for a note or a list: figures are said as they were told for this piece. */
import type { SetOut } from '../bench/set-out'
import type { Block, Inline } from '../lesson/schema'

/** At most two places, no trailing noughts: nobody at a bench reads more. */
const round = (value: number): string => Number(value.toFixed(2)).toString()

function figure(set: SetOut, name: string, to: number | undefined): string {
  const value = set.scope[name]
  if (!value) return name
  if (typeof value.value === 'boolean') return value.value ? 'yes' : 'no'
  if (typeof value.value === 'string') return value.value
  const shown = to ? Math.round(value.value / to) * to : value.value
  return value.kind === 'length' ? `${round(shown)} mm` : round(shown)
}

/** One run of inlines as text. */
export function plainOf(inlines: readonly Inline[], set: SetOut): string {
  return inlines.map((one): string => {
    switch (one.t) {
      case 'text': case 'code': return one.v
      case 'figure': return figure(set, one.name, one.to)
      case 'turning': return set.start.left && set.lesson.objectMayMirror ? (one.v === 'clockwise' ? 'anticlockwise' : 'clockwise') : one.v
      case 'break': return ' '
      case 'strong': case 'em': case 'link': return plainOf(one.c, set)
    }
  }).join('')
}

/** Blocks as text, one sentence after another. */
export function plainBlocks(blocks: readonly Block[], set: SetOut): string {
  return blocks.map((block): string => {
    switch (block.t) {
      case 'p': return plainOf(block.c, set)
      case 'ul': case 'ol': return block.items.map(item => plainBlocks(item, set)).join(' ')
      case 'quote': return plainBlocks(block.c, set)
      case 'fence': return block.v
      case 'rule': return ''
    }
  }).filter(Boolean).join(' ')
}
