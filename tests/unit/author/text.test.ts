import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { indent, lineAt, newLine, outdent, type TextEdit } from '~/utils/author/text'

const apply = (text: string, edit: TextEdit): string => text.slice(0, edit.from) + edit.text + text.slice(edit.to)

describe('the keys of the writing page', () => {
  it('indents the line of the caret by two spaces and keeps the caret in its word', () => {
    const edit = indent('HOLD it\nwrong: no', 10, 10)
    expect(apply('HOLD it\nwrong: no', edit)).toBe('HOLD it\n  wrong: no')
    expect(edit.select).toEqual([12, 12])
  })

  it('indents every line a selection touches, but not one it only ends before', () => {
    const text = 'a\nb\nc'
    expect(apply(text, indent(text, 0, 4))).toBe('  a\n  b\nc')
  })

  it('leaves empty lines of a block empty', () => {
    expect(apply('a\n\nb', indent('a\n\nb', 0, 4))).toBe('  a\n\n  b')
  })

  it('takes one space out where there is but one, and says so where there is none', () => {
    expect(apply(' a\n   b', outdent(' a\n   b', 0, 7) ?? never())).toBe('a\n b')
    expect(outdent('a', 0, 1)).toBeNull()
  })

  it('goes on in a keyword’s block, two spaces in', () => {
    const text = 'FAULT It snags'
    expect(apply(text, newLine(text, text.length, text.length) ?? never())).toBe('FAULT It snags\n  ')
  })

  it('leaves the block at an indented line with nothing in it', () => {
    const text = 'WHY\n  Because.\n  '
    expect(apply(text, newLine(text, text.length, text.length) ?? never())).toBe('WHY\n  Because.\n')
  })

  it('leaves plain lines to the browser', () => {
    expect(newLine('Cut it.', 7, 7)).toBeNull()
    expect(newLine('FAULTY wire', 11, 11)).toBeNull()
  })

  it('undoes an indent with an outdent, whatever the text and the selection', () => {
    fc.assert(fc.property(fc.string({ unit: fc.constantFrom('a', '\n', 'b') }), fc.nat(), fc.nat(), (text, a, b) => {
      const [from, to] = [a % (text.length + 1), b % (text.length + 1)].sort((x, y) => x - y) as [number, number]
      const edit = indent(text, from, to)
      const after = apply(text, edit)
      const back = outdent(after, ...edit.select)
      expect(back ? apply(after, back) : after).toBe(text)
    }))
  })

  it('counts lines from one', () => {
    expect([0, 1, 2, 3, 4].map(at => lineAt('a\n\nb', at))).toEqual([1, 1, 2, 3, 3])
  })
})

function never(): never {
  throw new Error('There was no edit.')
}
