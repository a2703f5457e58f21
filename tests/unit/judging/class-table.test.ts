import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import { barOf, type Bar, type Cell, type CellFacts, cellOf, isAway, lastAtWords, talliesOf, type TableRow } from '../../../shared/judging/class-table'
import { addDays } from '../../../shared/judging/days'
import { USUAL_SETTINGS } from '../../../shared/judging/settings'

const TODAY = '2026-11-12'
const NOTHING: CellFacts = { levelSigned: 0, oneSignature: false, aliveOn: null, keeps: null, openPiece: null, placeNo: null, places: null, waitingOn: null, sentBackOn: null }
const cell = (facts: Partial<CellFacts> | null, bar: Bar | null = null): Cell => cellOf({ person: 'dev', lesson: 'link' }, facts && { ...NOTHING, ...facts }, bar, USUAL_SETTINGS, TODAY)
const signed = (levelSigned: number, daysAgo: number) => ({ levelSigned, aliveOn: addDays(TODAY, -daysAgo), keeps: 182 })

describe('a cell', () => {
  it('is bare wire where nothing is on record', () => {
    expect(cell(null)).toMatchObject({ glyph: 'bare', level: null, says: 'not begun' })
    expect(cell({})).toMatchObject({ glyph: 'bare', says: 'not begun' })
  })
  it('says the level, the one signature and the days a piece waits', () => {
    expect(cell({ ...signed(3, 10), oneSignature: true, waitingOn: '2026-11-07' })).toMatchObject({ glyph: 'once', level: 3, waits: 5, also: { glyph: 'waits' }, says: 'With me in the room, 3, one signature; a piece waits for a look 5 days' })
  })
  it('says the step of a piece at the bench, with the numbers beside the mark', () => {
    expect(cell({ openPiece: 'x', placeNo: 6, places: 16 })).toMatchObject({ glyph: 'at', step: '6/16', also: null, says: 'at the bench, step 6 of 16' })
    expect(cell({ ...signed(2, 0), openPiece: 'x', placeNo: 6, places: 16 })).toMatchObject({ glyph: 'signed', level: 2, step: '6/16', also: { glyph: 'at' } })
  })
  it('a piece that waits comes before one at the bench, and that before one sent back', () => {
    expect(cell({ waitingOn: TODAY, openPiece: 'x', placeNo: 1, places: 2, sentBackOn: TODAY })).toMatchObject({ glyph: 'waits', step: null })
    expect(cell({ openPiece: 'x', placeNo: 1, places: 2, sentBackOn: TODAY }).glyph).toBe('at')
    expect(cell({ sentBackOn: addDays(TODAY, -1) })).toMatchObject({ glyph: 'back', says: 'a piece sent back 1 day ago' })
  })
  it('works a lapse out on the day: due within 30 days, one level less from its date on', () => {
    expect(cell(signed(4, 151))).toMatchObject({ glyph: 'signed', level: 4 })
    expect(cell(signed(4, 152))).toMatchObject({ glyph: 'due', level: 4, says: 'On your own, 4; refresh due in 30 days' })
    expect(cell(signed(4, 181))).toMatchObject({ glyph: 'due', says: 'On your own, 4; refresh due in 1 day' })
    expect(cell(signed(4, 182))).toMatchObject({ glyph: 'lapsed', level: 3, says: 'lapsed to With me in the room, 3' })
  })
  it('a bar closes what is not begun, and never hides work on record', () => {
    expect(cell(null, { permission: 'flame', why: 'age' })).toMatchObject({ glyph: 'closed', says: 'not open at this age: it needs Flame' })
    expect(cell(null, { permission: 'flame', why: 'none' })).toMatchObject({ glyph: 'closed', says: 'not open yet: Flame is not held' })
    expect(cell({ waitingOn: TODAY }, { permission: 'flame', why: 'none' }).glyph).toBe('waits')
    expect(cell(signed(2, 0), { permission: 'flame', why: 'none' })).toMatchObject({ glyph: 'signed', level: 2 })
    expect(cell(signed(2, 0), { permission: 'flame', why: 'suspended' })).toMatchObject({ glyph: 'suspended', level: 2, says: 'With me beside you, 2; Flame is suspended' })
  })
})

describe('what keeps a person from a lesson', () => {
  it('nothing where nothing is asked or all is held; customers’ goods are a matter of their own', () => {
    expect(barOf([], {}, '16-17', USUAL_SETTINGS)).toBeNull()
    expect(barOf(['flame', 'goods'], { flame: 'held' }, 'adult', USUAL_SETTINGS)).toBeNull()
  })
  it('a suspension is said before an age, an age before what is merely not held', () => {
    expect(barOf(['pickle', 'flame'], {}, '16-17', USUAL_SETTINGS)).toEqual({ permission: 'flame', why: 'age' })
    expect(barOf(['flame', 'pickle'], { pickle: 'suspended' }, '16-17', USUAL_SETTINGS)).toEqual({ permission: 'pickle', why: 'suspended' })
    expect(barOf(['flame', 'pickle'], { flame: 'held' }, 'adult', USUAL_SETTINGS)).toEqual({ permission: 'pickle', why: 'none' })
    expect(barOf(['flame'], { flame: 'held' }, '16-17', USUAL_SETTINGS)).toEqual({ permission: 'flame', why: 'age' })
  })
})

const row = (id: string, lastAt: string | null, ...cells: Cell[]): TableRow => ({ id, name: id, lastAt, cells: cells.map((one, i) => ({ ...one, person: id, lesson: `l${i}` })) })

describe('the tallies', () => {
  it('say how many wait and the oldest, who was away, and how many are at 3 or above; what is closed stays out', () => {
    const closed = cell(null, { permission: 'flame', why: 'age' })
    const tallies = talliesOf([
      row('amy', TODAY, cell(signed(4, 0)), cell({ waitingOn: '2026-11-07' }), closed), row('dev', addDays(TODAY, -14), cell(signed(4, 182)), cell({ ...signed(2, 0), waitingOn: TODAY }), closed), row('kit', null, cell(null), closed, closed),
    ], TODAY)
    expect(tallies.map(tally => tally.says)).toEqual(['2 pieces wait for a look, the oldest 5 days.', '2 people have had no bench time for 14 days.', '2 of 5 are at 3 or above.'])
    expect(tallies[0]?.cells).toEqual(['amy l1', 'dev l1'])
    expect(tallies[1]?.people).toEqual(['dev', 'kit'])
    expect(tallies[2]?.cells).toEqual(['amy l0', 'dev l0'])
  })
  it('say one as one, and nothing of an empty table', () => {
    expect(talliesOf([row('amy', TODAY, cell({ waitingOn: TODAY }))], TODAY).map(tally => tally.says)).toEqual(['1 piece waits for a look, the oldest since today.', '0 of 1 are at 3 or above.'])
    expect(talliesOf([row('amy', addDays(TODAY, -40), cell(null))], TODAY)[0]?.says).toBe('1 person has had no bench time for 14 days.')
    expect(talliesOf([], TODAY)).toEqual([])
  })
  it('point only to cells that are there, and never to a closed one', () => {
    const level = fc.integer({ min: 0, max: 5 })
    fc.assert(fc.property(fc.array(fc.array(fc.record({ level, ago: fc.integer({ min: 0, max: 400 }), isClosed: fc.boolean(), waits: fc.boolean() }), { minLength: 1, maxLength: 6 }), { maxLength: 8 }), (people) => {
      const rows = people.map((cells, i) => row(`p${i}`, null, ...cells.map(one => cell(one.level > 0 ? { ...signed(one.level, one.ago), waitingOn: one.waits ? TODAY : null } : null, one.isClosed ? { permission: 'flame', why: 'none' } : null))))
      const open = new Set(rows.flatMap(one => one.cells).filter(one => one.glyph !== 'closed').map(one => `${one.person} ${one.lesson}`))
      for (const tally of talliesOf(rows, TODAY)) for (const key of tally.cells) expect(open.has(key)).toBe(true)
      const three = talliesOf(rows, TODAY).find(tally => tally.key === 'three')
      if (open.size > 0) expect(three?.says).toBe(`${three?.cells.length} of ${open.size} are at 3 or above.`)
    }))
  })
})

it('says when a person was last at a bench', () => {
  expect([TODAY, addDays(TODAY, -1), addDays(TODAY, -19), null].map(day => lastAtWords(day, TODAY))).toEqual(['today', 'yesterday', '19 days', 'never'])
  expect([addDays(TODAY, -13), addDays(TODAY, -14), null].map(day => isAway(day, TODAY))).toEqual([false, true, true])
})
