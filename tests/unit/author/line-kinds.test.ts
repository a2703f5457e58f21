import { describe, expect, it } from 'vitest'
import { lineKinds } from '~/utils/author/line-kinds'

const kinds = (text: string) => lineKinds(text.split('\n'))

describe('tints behind the lines', () => {
  it('know the head, parts, steps and blocks', () => {
    expect(kinds('---\ntitle: A\n---\n\n# Part\n## Step\nWARNING It flies\n  Cover it.\nCut.\nHOLD After this\n  Look.\n\n  right: Yes\n\nGo on.'))
      .toEqual(['front', 'front', 'front', 'text', 'part', 'step', 'safety', 'safety', 'text', 'hold', 'hold', 'hold', 'hold', 'text', 'text'])
  })

  it('take a keyword only as a whole word in capitals at the margin', () => {
    expect(kinds('HOLDING on\nHold it\n\\HOLD as text\n HOLD in')).toEqual(['text', 'text', 'text', 'text'])
  })

  it('see no keyword in a fence, and no head that is not closed', () => {
    expect(kinds('```\nHOLD it\n```')).toEqual(['text', 'text', 'text'])
    expect(kinds('---\ntitle: A')).toEqual(['text', 'text'])
  })
})
