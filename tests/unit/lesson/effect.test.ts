import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { compile } from '#shared/lesson/compile'
import { effectOf } from '#shared/lesson/effect'

const source = readFileSync(new URL('../../fixtures/lessons/wrapped-loop-link.md', import.meta.url), 'utf8')
const lesson = compile(source).lesson
function changed(from: string, to: string) {
  if (!source.includes(from)) throw new Error(`The lesson has no ${from}`)
  return effectOf(lesson, compile(source.replace(from, to)).lesson)
}

describe('what a new revision changes', () => {
  it('is the first where there is none before', () => {
    expect(effectOf(null, lesson)).toEqual({ effect: 'first', says: [] })
  })

  it('is words only where text moved or was said better', () => {
    expect(effectOf(lesson, compile(`${source}\n\n`).lesson)).toEqual({ effect: 'words', says: [] })
    expect(changed('Draw the wire through the nylon jaws, twice.', 'Pull the wire through the nylon jaws, two times.').effect).toBe('words')
    expect(changed('# half-hard silver springs open', '# silver springs open').effect).toBe('words')
  })

  it('is a step where a figure or a step changed', () => {
    expect(changed('tail: 22 mm', 'tail: 26 mm')).toEqual({ effect: 'step', says: ['A size or a figure changed.'] })
    expect(changed('## Thread the bead\nkey: thread', '## Thread the bead\nkey: threading').effect).toBe('step')
  })

  it('is a standard where a tolerance, a criterion, a hold or a safety note changed', () => {
    expect(changed('is: link, within: 1 mm', 'is: link, within: 0.8 mm')).toEqual({ effect: 'standard', says: ['A measure or its tolerance changed.'] })
    expect(changed('judge: No tail catches', 'judge: No end catches').says).toEqual(['What is judged changed.'])
    expect(changed('  witness: below 3\n  wrong: The stick', '  witness: below 4\n  wrong: The stick').effect).toBe('standard')
    expect(changed('WARNING A loose wire end whips and can blind', 'CAUTION A loose wire end whips and can blind').effect).toBe('standard')
  })
})
