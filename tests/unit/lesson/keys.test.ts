import { readFileSync } from 'node:fs'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { compile } from '#shared/lesson/compile'
import { keyEdits, writeKeys } from '#shared/lesson/keys'

const keysOf = (source: string) => compile(source).lesson.parts.flatMap(part => [part.key, ...part.steps.map(step => step.key)])
const withKeys = (source: string) => writeKeys(source, keyEdits(source, compile(source).lesson))

describe('keys written into a source', () => {
  it('stand right under their headings, and only where none is', () => {
    expect(withKeys('# First end\n\n## Cut to length\nkey: cut\n\nCut it.\n\n## Bend it square\none_act: yes\n\nBend it.\n'))
      .toBe('# First end\nkey: first-end\n\n## Cut to length\nkey: cut\n\nCut it.\n\n## Bend it square\nkey: bend-it-square\none_act: yes\n\nBend it.\n')
  })

  it('see a key that stands after another field, or after one that goes on over lines', () => {
    const source = '## Wait for it\nsay: a long\n  word\none_act: yes\nkey: wait\n\nWait.\n'
    expect(withKeys(source)).toBe(source)
  })

  it('do not take a line of text that says key for one', () => {
    expect(withKeys('## Open\n\nkey: this is text, after an empty line\n')).toContain('## Open\nkey: open\n\n')
  })

  it('keep the line ends of the file, and its last line', () => {
    expect(withKeys('## Cut\r\n\r\nCut it.\r\n')).toBe('## Cut\r\nkey: cut\r\n\r\nCut it.\r\n')
    expect(withKeys('## Cut')).toBe('## Cut\nkey: cut')
  })

  it('give two steps of one title two keys', () => {
    expect(keysOf(withKeys('## Turn\n\nTurn it.\n\n## Turn\n\nTurn it.\n')).slice(1)).toEqual(['turn', 'turn-2'])
  })

  it('change nothing in a lesson that has them all', () => {
    const source = readFileSync(new URL('../../fixtures/lessons/wrapped-loop-link.md', import.meta.url), 'utf8')
    expect(keyEdits(source, compile(source).lesson)).toEqual([])
  })

  it('change no key, and nothing the second time, whatever the headings are', () => {
    const heading = fc.tuple(fc.constantFrom('# ', '## '), fc.string({ minLength: 1, maxLength: 12, unit: fc.constantFrom('a', 'B', ' ', '-', 'é', '1', ':') }), fc.constantFrom('\n\ntext\n\n', '\none_act: yes\n\ntext\n\n', '\nkey: own\n\ntext\n\n'))
    fc.assert(fc.property(fc.array(heading, { minLength: 1, maxLength: 6 }), (headings) => {
      const source = headings.map(parts => parts.join('')).join('')
      const written = withKeys(source)
      expect(keysOf(written)).toEqual(keysOf(source))
      expect(withKeys(written)).toBe(written)
    }))
  })
})
