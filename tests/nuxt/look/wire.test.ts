import { mount } from '@vue/test-utils'
import { describe, expect, it } from 'vitest'
import { GLYPH_SAYS, GLYPHS } from '~/components/wire/glyphs'
import RecordWire from '~/components/people/RecordWire.vue'
import WireGlyph from '~/components/wire/WireGlyph.vue'
import WireStrip, { type StripTurn } from '~/components/wire/WireStrip.vue'
import type { RecordAct } from '#shared/types/record'

describe('the marks', () => {
  it.each(GLYPHS)('%s has its name in words, and the level where it holds one', (glyph) => {
    const one = mount(WireGlyph, { props: { glyph, level: 3 } })
    expect(one.attributes('role')).toBe('img')
    expect(one.attributes('aria-label')).toBe(`${GLYPH_SAYS[glyph]} 3`)
    const isBead = !['bare', 'at', 'waits', 'back', 'closed'].includes(glyph)
    expect(one.find('text').exists() ? one.get('text').text() : null).toBe(isBead ? '3' : null)
  })
  it('no two are drawn alike, so that none is told by its colour alone', () => {
    const bare = (html: string) => html.replace(/(class|aria-label)="[^"]*"/g, '').replace(/<!--.*?-->/g, '')
    const drawn = GLYPHS.map((glyph) => {
      const one = mount(WireGlyph, { props: { glyph, level: 3 } })
      const isFilled = one.findAll('path').some(path => path.classes('fill-patina'))
      return bare(one.html()) + (isFilled ? ' filled' : '')
    })
    expect(new Set(drawn).size).toBe(GLYPHS.length)
  })
})

const turns = (count: number, holds: readonly number[], passed = 0): StripTurn[] =>
  Array.from({ length: count }, (_, i) => ({ no: i + 1, hold: holds.includes(i), holdPassed: i < passed, says: holds.includes(i) ? `hold ${i + 1}` : undefined }))
const strip = (of: { turns: StripTurn[], at: number }) => mount(WireStrip, { props: of })
const loops = (one: ReturnType<typeof strip>) => one.findAll('path').filter(path => path.attributes('d')?.includes('A14 14')).length

describe('the wire of a piece', () => {
  it('has a loop for each finished step, an open one with its number, and a facet before each step held', () => {
    const one = strip({ turns: turns(9, [2, 6], 3), at: 4 })
    expect(loops(one)).toBe(4)
    expect(one.findAll('path').filter(path => path.attributes('d')?.includes('A29 29'))).toHaveLength(1)
    expect(one.findAll('text').map(text => text.text())).toEqual(['5', 'hold 7'])
    expect(one.findAll('.stroke-garnet[d^="M-26"]').map(facet => facet.classes('fill-garnet'))).toEqual([true, false])
    expect(one.attributes('aria-label')).toBe('Step 5 of 9; a hold before step 7, hold 7')
  })
  it('says in words what of 60 turns does not fit, and a hold that lies past it', () => {
    const one = strip({ turns: turns(60, [55]), at: 20 })
    expect(one.findAll('text').map(text => text.text())).toEqual(['15 before', '31 more', '21'])
    expect(loops(one)).toBe(5)
    expect(one.attributes('aria-label')).toBe('Step 21 of 60; a hold before step 56, hold 56')
  })
  it('is all loops when all is done, and draws nothing for nothing', () => {
    const one = strip({ turns: turns(6, []), at: 6 })
    expect(loops(one)).toBe(6)
    expect(one.attributes('aria-label')).toBe('All 6 steps done')
    expect(strip({ turns: [], at: 0 }).findAll('path')).toHaveLength(0)
  })
})

const act = (id: string, day: string, more: Partial<RecordAct> = {}): RecordAct => ({ id, at: `${day}T12:00:00.000Z`, day, level: 2, kind: 'sign', by: 'Ruth Calder', byLevel: 5, lesson: 'l', title: 'Jump rings', revision: 1, says: null, piece: null, ...more })

describe('the long wire of a record', () => {
  it('has every act in order, refusals too; what falls on one day hangs below', () => {
    const one = mount(RecordWire, { props: { since: '2026-01-10', today: '2026-11-12', acts: [act('b', '2026-06-02', { kind: 'sent-back', level: null }), act('a', '2026-02-03'), act('c', '2026-06-02', { level: 3 })] } })
    expect(one.attributes('aria-label')).toBe('The wire of this record: 3 Feb 2026, With me beside you, 2 in Jump rings; 2 Jun 2026, sent back in Jump rings; 2 Jun 2026, With me in the room, 3 in Jump rings')
    const places = one.findAll('g[transform]').map(bead => bead.attributes('transform')?.match(/translate\((\S+) (\S+)\)/)?.slice(1).map(Number) ?? [])
    expect(places.map(place => place[1])).toEqual([64, 64, 91])
    expect(one.findAll('text').map(text => text.text())).toContain('Mar')
  })
  it('tells years, not months, where months would run together, and keeps what is older than the membership', () => {
    const one = mount(RecordWire, { props: { since: '2024-06-01', today: '2026-11-12', acts: [act('a', '2023-05-03')] } })
    expect(one.findAll('text').map(text => text.text())).toEqual(['2024', '2025', '2026', '2'])
    expect(one.get('g[transform]').attributes('transform')).toBe('translate(16 64)')
  })
  it('of nobody yet signed says so', () => {
    expect(mount(RecordWire, { props: { since: '2026-11-12', today: '2026-11-12', acts: [] } }).attributes('aria-label')).toBe('The wire of this record: nothing signed yet')
  })
})
