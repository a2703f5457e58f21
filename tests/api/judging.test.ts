import { and, eq, sql } from 'drizzle-orm'
import { isError } from 'h3'
import { ulid } from 'ulid'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { SignItem } from '#shared/schemas/judging'
import { judgements, marks, register, signOffs, standings } from '#server/db/schema/judging'
import { mail } from '#server/db/schema/people'
import { notes, pieces } from '#server/db/schema/pieces'
import { relations } from '#server/db/schema/studio'
import type { Actor } from '#server/services/actor'
import { judgePiece } from '#server/services/judgements'
import { lookView } from '#server/services/look-view'
import { countLooks, listLooks } from '#server/services/looks'
import { founding, secondName } from '#server/services/names-under'
import { actOnPermission, permissionsView } from '#server/services/permissions'
import { verify } from '#server/services/register'
import { signOffView } from '#server/services/sign-off-view'
import { signAll } from '#server/services/sign-offs'
import { readStanding, rebuildStandings } from '#server/services/standings'
import { waitingToSign } from '#server/services/to-sign'
import { readWords } from '#server/services/words'
import { databaseCode, inTransaction } from '#server/db/transaction'
import { openTest } from './harness'
import { DAY, fairJudgement, finishedPiece, giveLevel, makeWorld, Tablet, type World, wrappedLoop } from './judging-world'

const NOON = new Date('2026-03-17T12:00:00.000Z')
const after = (days: number): Date => new Date(NOON.getTime() + days * DAY)
let test: ReturnType<typeof openTest>
beforeAll(() => { test = openTest() })
afterAll(async () => { await test.close() })

const world = () => makeWorld(test.db, NOON)
const sitting = ulid()
const judge = (w: World, who: Actor, body: Awaited<ReturnType<typeof fairJudgement>>, at = NOON) => judgePiece(w.db, who, sitting, body, at)
/** Status and sentence a piece of work was refused with. */
async function refused(work: Promise<unknown>): Promise<{ status: number, says: string, data: unknown }> {
  try {
    await work
  }
  catch (error) {
    if (isError(error)) return { status: error.statusCode, says: error.message, data: error.data }
    throw error
  }
  throw new Error('It was not refused.')
}
/** Judged and kept at a level, the way from the bench to the list of what is to sign. */
async function judgedPiece(w: World, at: Date, level: 1 | 2 | 3 | 4 | 5 | null, more: Parameters<typeof fairJudgement>[2] = {}, who = w.who.ruth): Promise<string> {
  const piece = await finishedPiece(w, at)
  await judge(w, who, await fairJudgement(w, piece, { level, ...more }), at)
  return piece
}
async function itemToSign(w: World, who: Actor, at: Date, more: Partial<SignItem> = {}): Promise<SignItem> {
  const [item] = (await waitingToSign(w.db, who, at)).items
  if (!item) throw new Error('There is nothing to sign.')
  return { id: ulid(), judgements: item.judgements, level: item.level as SignItem['level'], n: item.n, head: item.head, words: '', ...more }
}
/** Three good pieces over eight days, the last seen whole, judged for level 4. */
async function toFour(w: World): Promise<Date> {
  await judgedPiece(w, after(1), null)
  await judgedPiece(w, after(2), null)
  await judgedPiece(w, after(9), 4, { seen: 'whole' })
  return after(9)
}

describe('judging a piece', () => {
  it('keeps the marks, numbers the event, tells the maker, and the piece waits no longer', async () => {
    const w = await world()
    const piece = await finishedPiece(w, NOON, { across: 4.7 })
    expect(await countLooks(w.db, w.studioId, NOON)).toBe(1)
    const body = await fairJudgement(w, piece, { level: 2, words: 'Neck cleaner than last time.', marks: { bead: { says: 'yes' }, safe: { says: 'yes' }, plane: { says: 'yes', rest: true }, loop: { value: '4.7' } } })
    expect(await judge(w, w.who.ruth, body)).toMatchObject({ id: body.id, level: 2, needsSecondName: false, isNew: true })
    const [row] = await w.db.select().from(pieces).where(and(eq(pieces.studioId, w.studioId), eq(pieces.id, piece)))
    expect(row).toMatchObject({ status: 'judged', n: body.n + 1, waitingSince: null })
    expect(await countLooks(w.db, w.studioId, NOON)).toBe(0)
    const kept = await w.db.select().from(marks).where(and(eq(marks.studioId, w.studioId), eq(marks.judgementId, body.id)))
    expect(new Map(kept.map(mark => [mark.criterion, [mark.says, mark.value, mark.within, mark.rest]]))).toEqual(new Map<string, unknown>([
      ['bead', ['yes', null, null, false]], ['safe', ['yes', null, null, false]], ['plane', ['yes', null, null, true]],
      // 4.7 is outside 4.4 +/- 0.2 and inside the 0.3 that is allowed up to level 2.
      ['loop', [null, '4.7', true, false]],
    ]))
    const [note] = await w.db.select().from(notes).where(and(eq(notes.studioId, w.studioId), eq(notes.pieceId, piece)))
    expect((await readWords(w.db, w.studioId, [note?.wordsId ?? ''])).get(note?.wordsId ?? '')).toBe('DEV-WL-1 was looked at and kept. Neck cleaner than last time.')
    expect((await w.db.select().from(mail).where(eq(mail.dedupeKey, `judged ${body.id}`)))[0]).toMatchObject({ kind: 'judged', toPerson: w.who.dev.personId })
  })

  it('is refused to the maker, to one who does not hold 5, and to one tied to the maker', async () => {
    const w = await world()
    const own = await finishedPiece(w, NOON, { maker: w.who.ruth })
    expect(await refused(judge(w, w.who.ruth, await fairJudgement(w, own)))).toMatchObject({ status: 403, says: 'Nobody signs their own work.' })
    const piece = await finishedPiece(w, NOON)
    const body = await fairJudgement(w, piece, { level: 2 })
    expect(await refused(judge(w, w.who.imran, body))).toMatchObject({ status: 403, says: 'To sign in this lesson you hold May teach, 5, in it yourself.' })
    expect((await refused(judge(w, w.who.owen, body))).status).toBe(403)
    await w.db.insert(relations).values({ studioId: w.studioId, id: ulid(), personA: w.who.dev.personId, personB: w.who.ruth.personId, kind: 'partner', declaredOn: '2026-01-01' })
    expect(await refused(judge(w, w.who.ruth, body))).toMatchObject({ status: 403, says: 'You are on record as a partner of Dev. Ask another instructor.' })
    expect(await w.db.select().from(judgements).where(eq(judgements.studioId, w.studioId))).toEqual([])
  })

  it('is not there for another studio', async () => {
    const [w, other] = [await world(), await world()]
    const piece = await finishedPiece(w, NOON)
    const body = await fairJudgement(w, piece)
    expect((await refused(judge(w, other.who.ruth, body))).status).toBe(404)
    expect((await refused(lookView(w.db, other.who.ruth, piece, NOON))).status).toBe(404)
    expect((await listLooks(w.db, other.who.ruth, NOON)).waiting).toEqual([])
  })

  it('asks for every essential line, and for the measure that is to be taken again', async () => {
    const w = await world()
    const piece = await finishedPiece(w, NOON)
    const body = await fairJudgement(w, piece)
    expect(await refused(judge(w, w.who.ruth, { ...body, marks: { plane: { says: 'yes' }, loop: { value: '4.4' }, safe: { says: 'yes' } } }))).toMatchObject({ status: 422, says: 'Not marked yet: “Bead unmarked”.' })
    expect(await refused(judge(w, w.who.ruth, { ...body, marks: { bead: { says: 'yes' }, safe: { says: 'yes' } } }))).toMatchObject({ status: 422, says: 'Measure again: “First loop to size”.' })
    expect((await refused(judge(w, w.who.ruth, { ...body, marks: { ...body.marks, loop: { says: 'yes' } } }))).says).toBe('“First loop to size” is measured, not judged.')
    expect((await refused(judge(w, w.who.ruth, { ...body, marks: { ...body.marks, bead: { says: 'yes', rest: true } } }))).says).toBe('Essential lines are marked one by one.')
    expect((await refused(judge(w, w.who.ruth, { ...body, seen: 'piece' }))).says).toBe('“Eye protection on” is seen live or not at all.')
  })

  it('gives no 3 where an essential line is no, and says which', async () => {
    const w = await world()
    await judgedPiece(w, after(1), null)
    const piece = await finishedPiece(w, after(2))
    const body = await fairJudgement(w, piece, { level: 3 })
    const said = await refused(judge(w, w.who.ruth, { ...body, marks: { ...body.marks, bead: { says: 'no' } } }, after(2)))
    expect(said).toMatchObject({ status: 422, says: 'Essential: “Bead unmarked” is marked no.' })
    expect((await judge(w, w.who.ruth, body, after(2))).level).toBe(3)
  })

  it('does not count a piece outside the sizes of the lesson', async () => {
    const w = await world()
    await judgedPiece(w, after(1), null)
    const piece = await finishedPiece(w, after(2), { across: 9, begin: { sizes: { across: { value: '9', typed: '9' }, joins: { value: 'nothing', typed: '' } } } })
    const body = await fairJudgement(w, piece, { level: 3 })
    expect((await refused(judge(w, w.who.ruth, { ...body, marks: { ...body.marks, loop: { value: '9' } } }, after(2)))).says).toBe('Its sizes are outside what the lesson covers, so it is practice and does not count.')
  })

  it('is one row for a double press, and for twenty at once', async () => {
    const w = await world()
    const piece = await finishedPiece(w, NOON)
    const body = await fairJudgement(w, piece)
    const all = await Promise.all(Array.from({ length: 20 }, () => judge(w, w.who.ruth, body)))
    expect(all.filter(one => one.isNew)).toHaveLength(1)
    expect(new Set(all.map(one => one.id))).toEqual(new Set([body.id]))
    expect((await judge(w, w.who.ruth, body)).isNew).toBe(false)
    expect(await w.db.select().from(judgements).where(eq(judgements.studioId, w.studioId))).toHaveLength(1)
    const [row] = await w.db.select({ n: pieces.n }).from(pieces).where(and(eq(pieces.studioId, w.studioId), eq(pieces.id, piece)))
    expect(row?.n).toBe(body.n + 1)
  })

  it('is refused when more came in than the page showed, and says how much', async () => {
    const w = await world()
    const tablet = new Tablet(w, w.who.dev)
    await tablet.send([tablet.begin(NOON), ...tablet.work(NOON), tablet.event('piece.finished', {}, NOON)], NOON)
    const body = await fairJudgement(w, tablet.piece)
    await tablet.send([tablet.event('fault.seen', { turn: null, fault: 'tight' }, NOON), tablet.event('own.marked', { criterion: 'bead', says: 'yes' }, NOON)], NOON)
    expect(await refused(judge(w, w.who.ruth, body))).toMatchObject({ status: 409, says: '2 more things came in. Look again.' })
    expect((await refused(judge(w, w.who.ruth, { ...body, n: body.n + 2 }))).says).toBe('What is here is not what you were shown. Look again.')
    expect((await judge(w, w.who.ruth, await fairJudgement(w, tablet.piece))).isNew).toBe(true)
  })

  it('waits for photos that are still on the tablet, unless the piece is in the hand', async () => {
    const w = await world()
    const tablet = new Tablet(w, w.who.dev)
    const photo = { photo: ulid(), turn: 'cut', for: 'step', sha256: 'c'.repeat(64), bytes: 1000, type: 'image/jpeg', width: 100, height: 100 } as const
    await tablet.send([tablet.begin(NOON), tablet.event('photo.taken', photo, NOON), ...tablet.work(NOON), tablet.event('piece.finished', {}, NOON)], NOON)
    const body = await fairJudgement(w, tablet.piece)
    expect(await refused(judge(w, w.who.ruth, body))).toMatchObject({ status: 409, data: { awaited: 1 } })
    await judge(w, w.who.ruth, { ...body, inHand: true })
    expect((await w.db.select().from(judgements).where(eq(judgements.id, body.id)))[0]?.inHand).toBe(true)
  })

  it('sends back with a reason, and to mend with the steps to make again', async () => {
    const w = await world()
    const back = await finishedPiece(w, NOON)
    const body = await fairJudgement(w, back, { outcome: 'sent-back' })
    expect((await refused(judge(w, w.who.ruth, body))).says).toBe('Say why it is sent back.')
    await judge(w, w.who.ruth, { ...body, words: 'The bead is tight.', faults: ['tight'] })
    expect(await readStanding(w.db, w.studioId, w.who.dev.personId, w.lessonId)).toMatchObject({ sentBackOn: '2026-03-17', levelSigned: 0 })
    const mend = await finishedPiece(w, after(1))
    const again = await fairJudgement(w, mend, { outcome: 'mend', words: 'Press the tail in.' })
    expect((await refused(judge(w, w.who.ruth, again, after(1)))).says).toBe('Say from which step it is made again.')
    expect((await refused(judge(w, w.who.ruth, { ...again, remake: ['nowhere'] }, after(1)))).status).toBe(422)
    await judge(w, w.who.ruth, { ...again, remake: ['turns@1.2'] }, after(1))
    expect((await w.db.select().from(pieces).where(eq(pieces.id, mend)))[0]).toMatchObject({ status: 'at-bench', place: 'turns@1.2' })
  })
})

describe('what waits', () => {
  it('lists what is finished, oldest first, with what you may do about it', async () => {
    const w = await world()
    const first = await finishedPiece(w, NOON)
    const second = await finishedPiece(w, after(1), { maker: w.who.amy })
    const { waiting } = await listLooks(w.db, w.who.ruth, after(2))
    expect(waiting.map(row => [row.piece, row.label, row.mayYou.may])).toEqual([[first, 'DEV-WL-1', 'sign'], [second, 'AMY-WL-1', 'sign']])
    expect((await listLooks(w.db, w.who.imran, after(2))).waiting[0]?.mayYou).toEqual({ may: 'countersign' })
    expect((await listLooks(w.db, w.who.owen, after(2))).waiting[0]?.mayYou).toEqual({ may: 'not', because: 'Only an instructor of this studio signs.' })
  })
  it('leaves a resting piece below until its wait is over', async () => {
    const w = await world()
    const value = { ...w.lesson, parts: w.lesson.parts.map(part => ({ ...part, steps: part.steps.map((step, i) => i > 0 ? step : { ...step, waits: [{ length: { k: 'num' as const, v: 24, unit: 'h' as const }, why: null, when: null, range: step.range }] }) })) }
    const resting = await makeWorld(test.db, NOON, value)
    const tablet = new Tablet(resting, resting.who.dev)
    await tablet.send([tablet.begin(NOON), tablet.event('wait.started', { turn: 'cut', wait: 0, until: after(1).toISOString() }, NOON), ...tablet.work(NOON), tablet.event('piece.finished', {}, NOON)], NOON)
    expect(await listLooks(resting.db, resting.who.ruth, NOON)).toMatchObject({ waiting: [], resting: [{ piece: tablet.piece, at: after(1).toISOString() }] })
    expect(await countLooks(resting.db, resting.studioId, NOON)).toBe(0)
    expect((await listLooks(resting.db, resting.who.ruth, after(2))).waiting).toHaveLength(1)
  })
  it('shows the looks that are asked for at the bench', async () => {
    const w = await world()
    const tablet = new Tablet(w, w.who.dev)
    await tablet.send([tablet.begin(NOON), tablet.event('look.asked', { turn: 'cut', about: 'stuck' }, NOON)], NOON)
    expect((await listLooks(w.db, w.who.ruth, NOON)).asked).toMatchObject([{ piece: tablet.piece, about: 'stuck', maker: 'Dev Rana' }])
  })
  it('shows a piece with its lines, what was missed, its history and the gates’ facts', async () => {
    const w = await world()
    await judgedPiece(w, after(1), null)
    const piece = await finishedPiece(w, after(2), { across: 4.7 })
    const view = await lookView(w.db, w.who.ruth, piece, after(2))
    expect(view.lines.map(line => [line.key, line.band])).toEqual([['plane', '30 cm'], ['bead', 'loupe'], ['loop', 'measure'], ['safe', 'seen live']])
    expect(view).toMatchObject({ again: 'loop', isOpen: true, judged: null, mayYou: { may: 'sign' }, history: [{ label: 'DEV-WL-1', outcome: 'kept', by: 'Ruth Calder' }] })
    expect(view.lines[2]).toMatchObject({ value: 4.7, inside: [true, true, true, false, false, false] })
    expect(view.faults).toEqual([{ key: 'tight', sees: 'The bead is tight', because: 'the neck was too short', do: 'Remake with a longer neck.' }])
  })
})

describe('signing', () => {
  it('signs what was judged: register, standing, a letter, and nothing left to sign', async () => {
    const w = await world()
    await judgedPiece(w, after(1), null)
    await judgedPiece(w, after(2), 3)
    const item = await itemToSign(w, w.who.ruth, after(2))
    expect(item.judgements).toHaveLength(2)
    expect(await signAll(w.db, w.who.ruth, [item], after(2))).toEqual([{ id: item.id, ok: true, level: 3, needsSecondName: false }])
    expect(await readStanding(w.db, w.studioId, w.who.dev.personId, w.lessonId)).toMatchObject({ levelSigned: 3, oneSignature: false, signedOn: '2026-03-19', aliveOn: '2026-03-19', keeps: 182, signOffId: item.id })
    expect((await waitingToSign(w.db, w.who.ruth, after(2))).items).toEqual([])
    const rows = await w.db.select().from(register).where(and(eq(register.studioId, w.studioId), eq(register.objectId, item.id)))
    expect(rows).toHaveLength(1)
    expect(rows[0]?.body).not.toContain('Dev')
    expect(await verify(w.db, w.studioId)).toMatchObject({ broken: null })
    expect((await w.db.select().from(mail).where(eq(mail.dedupeKey, `signed ${item.id}`)))[0]?.toPerson).toBe(w.who.dev.personId)
  })

  it('is one row for a double press, and for twenty at once', async () => {
    const w = await world()
    await judgedPiece(w, after(1), 2)
    const item = await itemToSign(w, w.who.ruth, after(1))
    const all = await Promise.all(Array.from({ length: 20 }, () => signAll(w.db, w.who.ruth, [item], after(1))))
    expect(all.flat().every(one => one.ok && one.id === item.id)).toBe(true)
    const rows = await w.db.select().from(signOffs).where(and(eq(signOffs.studioId, w.studioId), eq(signOffs.personId, w.who.dev.personId)))
    expect(rows).toHaveLength(1)
    expect(await w.db.select().from(register).where(and(eq(register.studioId, w.studioId), eq(register.objectId, item.id)))).toHaveLength(1)
  })

  it('is one row for two different ids at once', async () => {
    const w = await world()
    await judgedPiece(w, after(1), 2)
    const items = await Promise.all([itemToSign(w, w.who.ruth, after(1)), itemToSign(w, w.who.ruth, after(1))])
    const results = (await Promise.all(items.map(item => signAll(w.db, w.who.ruth, [item], after(1))))).flat()
    expect(results.filter(one => one.ok)).toHaveLength(1)
    expect(results.find(one => !one.ok)).toMatchObject({ statusCode: 422, says: 'Dev holds this already.' })
  })

  it('signs each by itself: what may not be signed keeps none of the others back', async () => {
    const w = await world()
    await judgedPiece(w, after(1), 2)
    const item = await itemToSign(w, w.who.ruth, after(1))
    const results = await signAll(w.db, w.who.ruth, [{ ...item, id: ulid(), level: 3 }, { ...item, id: ulid(), judgements: [ulid()] }, item], after(1))
    expect(results.map(one => one.ok || one.statusCode)).toEqual([409, 404, true])
  })

  it('asks the gate again, and is only for the one who judged', async () => {
    const w = await world()
    await judgedPiece(w, after(1), 2)
    const item = await itemToSign(w, w.who.ruth, after(1))
    expect(await signAll(w.db, w.who.imran, [item], after(1))).toMatchObject([{ ok: false, statusCode: 404 }])
    // A year on, Ruth's own 5 has lapsed.
    expect(await signAll(w.db, w.who.ruth, [item], after(400))).toMatchObject([{ ok: false, statusCode: 422, says: 'Your own May teach, 5, has lapsed in this lesson. Have it refreshed first.' }])
  })

  it('is refused when something joined since the page was shown; once shown it is signed, and said beside the sign-off', async () => {
    const w = await world()
    const tablet = new Tablet(w, w.who.dev)
    await tablet.send([tablet.begin(NOON), ...tablet.work(NOON), tablet.event('piece.finished', {}, NOON)], NOON)
    await judge(w, w.who.ruth, await fairJudgement(w, tablet.piece, { level: 2 }))
    const item = await itemToSign(w, w.who.ruth, NOON)
    const late = (at = NOON) => tablet.send([tablet.event('fault.seen', { turn: null, fault: 'tight' }, at)], at)
    await late()
    expect(await signAll(w.db, w.who.ruth, [item], NOON)).toMatchObject([{ ok: false, statusCode: 409, says: '1 more thing came in. Look again.' }])
    expect((await waitingToSign(w.db, w.who.ruth, NOON)).items[0]?.came).toBe(1)
    const shown = await itemToSign(w, w.who.ruth, NOON)
    expect(await signAll(w.db, w.who.ruth, [shown], NOON)).toMatchObject([{ ok: true }])
    await late(after(1))
    const view = await signOffView(w.db, w.who.dev, shown.id)
    expect(view).toMatchObject({ joinedAfter: 1, isWhole: true, level: 2, isInForce: true, names: [{ name: 'Ruth Calder' }] })
    expect((await refused(signOffView(w.db, w.who.amy, shown.id))).status).toBe(404)
  })
})

describe('level 4', () => {
  it('stands as one signature until a second instructor who holds 4 gives the second name', async () => {
    const w = await world()
    const at = await toFour(w)
    const item = await itemToSign(w, w.who.ruth, at)
    expect(await signAll(w.db, w.who.ruth, [item], at)).toMatchObject([{ ok: true, level: 4, needsSecondName: true }])
    const standing = () => readStanding(w.db, w.studioId, w.who.dev.personId, w.lessonId)
    expect(await standing()).toMatchObject({ levelSigned: 4, oneSignature: true })
    expect(await refused(secondName(w.db, w.who.ruth, item.id, ulid(), at))).toMatchObject({ status: 403, says: 'Yours is the first name. The second is another person’s.' })
    expect((await refused(secondName(w.db, w.who.dev, item.id, ulid(), at))).status).toBe(403)
    expect((await waitingToSign(w.db, w.who.imran, at)).secondNames).toMatchObject([{ signOff: item.id, reasons: [] }])
    const id = ulid()
    const all = await Promise.all(Array.from({ length: 5 }, () => secondName(w.db, w.who.imran, item.id, id, at)))
    expect(new Set(all.map(one => one.row.id))).toEqual(new Set([id]))
    expect(await standing()).toMatchObject({ levelSigned: 4, oneSignature: false, signOffId: item.id })
    expect((await refused(secondName(w.db, w.who.dilys, item.id, ulid(), at))).status).toBe(409)
    expect((await waitingToSign(w.db, w.who.dilys, at)).secondNames).toEqual([])
    expect(await signOffView(w.db, w.who.dev, item.id)).toMatchObject({ oneSignature: false, isWhole: true, names: [{ kind: 'sign', name: 'Ruth Calder' }, { kind: 'countersign', name: 'Imran Sethi' }] })
  })
  it('asks for a word where a line is no', async () => {
    const w = await world()
    await judgedPiece(w, after(1), null)
    await judgedPiece(w, after(2), null)
    const piece = await finishedPiece(w, after(9))
    const body = await fairJudgement(w, piece, { level: 4, seen: 'whole' })
    const withNo = { ...body, marks: { ...body.marks, plane: { says: 'no' as const } } }
    expect((await refused(judge(w, w.who.ruth, withNo, after(9)))).says).toBe('A line is no, or outside. Say a word why it may be so.')
    expect((await judge(w, w.who.ruth, { ...withNo, words: 'Made at right angles, as asked.' }, after(9))).level).toBe(4)
  })
})

describe('the founding level', () => {
  it('is given once by the manager, shown as such, and not where somebody holds 5', async () => {
    const w = await world()
    expect(await readStanding(w.db, w.studioId, w.who.ruth.personId, w.lessonId)).toMatchObject({ levelSigned: 5, oneSignature: false, flags: ['founding'] })
    const given = { id: ulid(), person: w.who.dilys.personId, lesson: w.lessonId } as const
    expect(await refused(founding(w.db, w.who.owen, given, NOON))).toMatchObject({ status: 422 })
    expect((await refused(founding(w.db, w.who.ruth, given, NOON))).status).toBe(403)
    expect((await refused(founding(w.db, w.who.owen, { ...given, person: w.who.amy.personId }, after(800)))).says).toBe('Amy Brandt is not an instructor of this studio.')
    // Ruth's has lapsed by then, and nobody else holds 5.
    const all = await Promise.all(Array.from({ length: 5 }, () => founding(w.db, w.who.owen, given, after(800))))
    expect(all.filter(one => one.isNew)).toHaveLength(1)
    expect(all[0]?.row).toMatchObject({ id: given.id, kind: 'founding', level: 5, by: w.who.owen.personId })
  })
})

describe('permissions', () => {
  it('are in the register, once for a double press, and keep level 3 shut in a lesson that asks for one', async () => {
    const w = await makeWorld(test.db, NOON, wrappedLoop({ permissions: ['flame'] }))
    await judgedPiece(w, after(1), null)
    const piece = await finishedPiece(w, after(2))
    const body = await fairJudgement(w, piece, { level: 3 })
    expect((await refused(judge(w, w.who.ruth, body, after(2)))).says).toBe('Dev has no permission for flame yet.')
    const act = { id: ulid(), permission: 'flame', act: 'grant', words: '', limit: '' } as const
    const all = await Promise.all(Array.from({ length: 5 }, () => actOnPermission(w.db, w.who.imran, w.who.dev.personId, act, after(2))))
    expect(all.filter(one => one.isNew)).toHaveLength(1)
    expect(await w.db.select().from(register).where(and(eq(register.studioId, w.studioId), eq(register.objectId, act.id)))).toHaveLength(1)
    expect((await judge(w, w.who.ruth, body, after(2))).level).toBe(3)
    const stop = { ...act, id: ulid(), act: 'suspend', words: 'Walked off with the gas on.' } as const
    await actOnPermission(w.db, w.who.ruth, w.who.dev.personId, stop, after(3))
    expect(await permissionsView(w.db, w.who.owen, w.who.dev.personId)).toMatchObject({ held: [{ permission: 'flame', state: 'suspended' }, {}, {}, {}], acts: [{ act: 'grant' }, { act: 'suspend', words: 'Walked off with the gas on.', by: 'Ruth Calder' }] })
    expect((await refused(actOnPermission(w.db, w.who.ruth, w.who.dev.personId, { ...stop, id: ulid(), act: 'lift' }, after(3)))).says).toBe('You suspended it. Another person reviews it.')
    expect((await refused(actOnPermission(w.db, (await world()).who.ruth, w.who.dev.personId, { ...act, id: ulid() }, after(3)))).status).toBe(404)
  })
})

/** The database's own code for what it refuses. */
const codeOf = (work: Promise<unknown>): Promise<string | null> => work.then(() => null, (error: unknown) => databaseCode(error))

describe('what only grows', () => {
  it('cannot be changed or taken away by the application: marks, judgements, sign-offs, the pieces under them, the register', async () => {
    const w = await world()
    await judgedPiece(w, after(1), 2)
    await signAll(w.db, w.who.ruth, [await itemToSign(w, w.who.ruth, after(1))], after(1))
    for (const table of ['marks', 'judgements', 'sign_offs', 'sign_off_pieces', 'register']) {
      expect(await codeOf(w.db.execute(sql`UPDATE ${sql.identifier(table)} SET studio_id = studio_id WHERE studio_id = ${w.studioId}`))).toBe('ER_TABLEACCESS_DENIED_ERROR')
      expect(await codeOf(w.db.execute(sql`DELETE FROM ${sql.identifier(table)} WHERE studio_id = ${w.studioId}`))).toBe('ER_TABLEACCESS_DENIED_ERROR')
    }
  })
  it('gives the same standings when they are worked out again, and says when one was tampered with', async () => {
    const w = await world()
    await judgedPiece(w, after(1), 2)
    await signAll(w.db, w.who.ruth, [await itemToSign(w, w.who.ruth, after(1))], after(1))
    await giveLevel(w, 'amy', 4, after(2))
    const rebuild = (mend = false) => inTransaction(w.db, tx => rebuildStandings(tx, w.studioId, mend))
    expect(await rebuild()).toEqual([])
    await w.db.update(standings).set({ levelSigned: 5 }).where(and(eq(standings.studioId, w.studioId), eq(standings.personId, w.who.dev.personId)))
    expect(await rebuild(true)).toMatchObject([{ personId: w.who.dev.personId, stored: { levelSigned: 5 }, worked: { levelSigned: 2 } }])
    expect(await rebuild()).toEqual([])
  })
})
