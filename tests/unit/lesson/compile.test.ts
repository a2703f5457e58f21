import { readdirSync, readFileSync } from 'node:fs'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { compile, errorsOf, LONGEST_SOURCE } from '../../../shared/lesson/compile'
import { CODES } from '../../../shared/lesson/findings'
import { LessonSchema } from '../../../shared/lesson/schema'

const FOLDER = new URL('../../fixtures/lessons/', import.meta.url)
const read = (name: string) => readFileSync(new URL(name, FOLDER), 'utf8')
const WHOLE = readdirSync(FOLDER).filter(name => name.endsWith('.md'))

describe('the three design lessons', () => {
  it.each(WHOLE)('%s compiles with no error but functions that are not there yet', (name) => {
    const compiled = compile(read(name))
    expect(errorsOf(compiled).filter(finding => finding.code !== 'function-not-yet')).toEqual([])
    expect(LessonSchema.safeParse(compiled.lesson).success).toBe(true)
  })

  it('the wrapped-loop link has its 32 steps, 17 criteria and every hold', () => {
    const { lesson, findings } = compile(read('wrapped-loop-link.md'))
    expect(findings.filter(finding => finding.severity === 'error')).toEqual([])
    const steps = lesson.parts.flatMap(part => part.steps)
    expect([steps.length, lesson.criteria.length, lesson.closing.length]).toEqual([32, 17, 5])
    expect(steps.filter(step => step.holds.length > 0).map(step => step.key)).toEqual(['measure', 'prove', 'wrap-first', 'trim-first', 'wrap-second', 'trim-second'])
    expect(steps.find(step => step.key === 'wrap-first')?.holds.map(hold => hold.witness)).toEqual(['below 3', 'below 3', 'below 3'])
    expect(lesson.figures.map(figure => [figure.name, figure.kind])).toContainEqual(['joined', 'yes_no'])
  })
})

// Text fixtures: `=== name`, the source, `--- code line:column`, one line for each finding expected.
interface Fixture { name: string, source: string, expected: string[] }
const fixtures: Fixture[] = readdirSync(FOLDER).filter(name => name.endsWith('.txt')).flatMap(file => read(file).split(/^=== /m).slice(1).map((part) => {
  const [head = '', ...lines] = part.split('\n')
  const expected = lines.filter(line => line.startsWith('>>> ')).map(line => line.slice(4).trim())
  const body = lines.filter(line => !line.startsWith('>>> ')).join('\n').replace(/\n+$/, '\n')
  return { name: `${file}: ${head.trim()}`, source: body.startsWith('~~~bare\n') ? body.slice(8) : frame(body), expected }
}))

/** A fixture is put into a lesson with nothing wrong, unless it brings its own front matter. */
function frame(body: string): string {
  return body.startsWith('---\n') ? body : `---\ntitle: Link\ncraft: wire\npiece: one link\ntime: { maker: 3 min, first: 25 min, later: 8 min }\ncriteria:\n  - { key: bead, judge: Bead unmarked }\nsizes:\n  bead: { ask: Bead, unit: mm, usual: 8, from: 6, to: 12 }\n  wire: { ask: Wire, unit: wire, usual: 0.7 mm, from: 0.6 mm, to: 0.9 mm }\n  links: { ask: Links, unit: count, usual: 2, from: 1, to: 5 }\n  joins: { ask: Joins, unit: choice, choices: [nothing, the clasp], usual: nothing }\nfigures:\n  loop: ring(bead, wire)\nreadings:\n  across: { ask: Across, unit: mm, is: loop, within: 0.2 mm }\n---\n${body}`
}

const TEACHING = ['no-way-to-know', 'no-picture-no-measure']

describe('findings', () => {
  it.each(fixtures.map(fixture => [fixture.name, fixture] as const))('%s', (_, { source, expected }) => {
    const options = { pictures: new Set(['there.svg']), lessons: new Set(['jump-rings']), previous: compile(frame('\n## Old step\nkey: old-step\n\nCut {loop}.\n\n## Bend it square\nkey: bend\n\nBend {loop}.\n')).lesson }
    const found = compile(source, source.includes('key: old-step') || source.includes('# previous') ? options : { ...options, previous: null }).findings
    // Advice on teaching is expected only where a fixture is about it.
    const told = found.map(finding => finding.code).filter(code => !TEACHING.includes(code) || expected.includes(code))
    expect([...new Set(told)].sort()).toEqual([...new Set(expected.map(line => line.split(' ')[0] ?? ''))].sort())
    for (const line of expected) {
      const [code, text] = [line.split(' ')[0], line.split(' ').slice(1).join(' ')]
      if (text) expect(found.filter(finding => finding.code === code).map(finding => source.slice(finding.from, finding.to))).toContain(text)
    }
    for (const { from, to, line, column } of found) {
      expect(from).toBeLessThanOrEqual(to)
      expect(to).toBeLessThanOrEqual(source.length)
      expect(source.split('\n')[line - 1]?.length ?? 0).toBeGreaterThanOrEqual(column - 1)
    }
  })

  it('there is a fixture for every finding of the closed list', () => {
    const shown = new Set(fixtures.flatMap(fixture => fixture.expected.map(line => line.split(' ')[0])))
    expect(Object.keys(CODES).filter(code => !shown.has(code) && code !== 'too-long')).toEqual([])
  })

  it('a mend, once made, takes its finding away', () => {
    for (const { source } of fixtures) {
      for (const { mend, code } of compile(source, { pictures: new Set(['there.svg']) }).findings) {
        if (!mend) continue
        const mended = source.slice(0, mend.from) + mend.text + source.slice(mend.to)
        const count = (text: string) => compile(text, { pictures: new Set(['there.svg']) }).findings.filter(finding => finding.code === code).length
        expect(count(mended), `${code}: ${mend.says}\n${mended}`).toBeLessThan(count(source))
      }
    }
  })
})

describe('whatever it is given', () => {
  const base = read('wrapped-loop-link.md')
  const runs = process.env.TEST_LONG ? 1000 : 100
  const minutes = 60_000 * (process.env.TEST_LONG ? 30 : 1)

  it('never throws and keeps its ranges inside the source', () => {
    const pieces = fc.constantFrom('HOLD', 'HOLD:', '\n', '  ', '---\n', '{', '}', '# ', '## ', 'not: a -> b', '&a *a', '!!js', '```', '<script>', '](javascript:x)', '\t', '- ', ': ', '__proto__', 'constructor', 'when: turn == 1', '\u0000', '🪡')
    fc.assert(fc.property(fc.array(fc.tuple(fc.nat(base.length), fc.nat(40), pieces), { maxLength: 8 }), (edits) => {
      let source = base
      for (const [at, cut, put] of edits) source = source.slice(0, at) + put + source.slice(at + cut)
      const { lesson, findings } = compile(source)
      expect(LessonSchema.safeParse(lesson).success).toBe(true)
      for (const { from, to } of findings) expect(from >= 0 && from <= to && to <= source.length).toBe(true)
    }), { numRuns: runs })
  }, minutes)

  it('reads a file an editor has put a byte order mark before, at the same lines', () => {
    const marked = compile(`\uFEFF${base}`)
    expect(marked.lesson.title).toBe(compile(base).lesson.title)
    expect(marked.findings.map(({ code, line }) => [code, line])).toEqual(compile(base).findings.map(({ code, line }) => [code, line]))
  })

  it('reads any text at all', () => {
    fc.assert(fc.property(fc.string({ maxLength: 400, unit: 'binary' }), (text) => {
      expect(LessonSchema.safeParse(compile(text).lesson).success).toBe(true)
      expect(LessonSchema.safeParse(compile(`---\n${text}\n---\n${text}`).lesson).success).toBe(true)
    }), { numRuns: runs })
  }, minutes)

  it('says so where a source is too long, and reads what it may', () => {
    const long = `${base}\n${'a'.repeat(LONGEST_SOURCE)}`
    expect(compile(long).findings.map(finding => finding.code)).toContain('too-long')
    const many = `${base}\n${Array.from({ length: 220 }, (_, i) => `\n## Step ${i}\n\nCut {cut}.\n`).join('')}`
    expect(compile(many).findings.map(finding => finding.code)).toContain('too-long')
  })
})
