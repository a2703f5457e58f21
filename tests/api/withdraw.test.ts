import { and, eq } from 'drizzle-orm'
import { ulid } from 'ulid'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { pieceEvents, pieces } from '#server/db/schema/pieces'
import { isState } from '#server/services/ledger'
import { backInUse, withdraw } from '#server/services/revisions'
import { type Desk, later, NOON, openDesk } from './authoring-world'
import { finishedPiece, makeWorld, Tablet, type World } from './judging-world'

let desk: Desk
let world: World
beforeAll(async () => { desk = await openDesk(); world = await makeWorld(desk.db, NOON) })
afterAll(async () => { await desk.close() })

async function stateOf(piece: string) {
  const [row] = await desk.db.select({ state: pieces.state }).from(pieces).where(and(eq(pieces.studioId, world.studioId), eq(pieces.id, piece)))
  if (!isState(row?.state)) throw new Error('There is no such piece.')
  return row.state
}
const kindsOf = async (piece: string) => (await desk.db.select({ kind: pieceEvents.kind }).from(pieceEvents).where(and(eq(pieceEvents.studioId, world.studioId), eq(pieceEvents.pieceId, piece)))).map(row => row.kind)

describe('a lesson withdrawn for danger', () => {
  it('stops each piece of it on the bench once, but for the withdrawer’s own, and lets them go on when it is back', async () => {
    const [devs, ruths, plain] = [new Tablet(world, world.who.dev), new Tablet(world, world.who.ruth), new Tablet(world, world.who.amy)]
    await devs.send([devs.begin(NOON)], NOON)
    await ruths.send([ruths.begin(NOON)], NOON)
    await plain.send([plain.begin(NOON)], NOON)
    const finished = await finishedPiece(world, NOON)
    const act = { id: ulid(), revision: world.revisionId, danger: true }
    await Promise.all([1, 2].map(() => withdraw(desk.db, world.who.ruth, ulid(), world.lessonId, act, later(1))))
    expect((await stateOf(devs.piece)).stopped).toMatchObject({ why: 'lesson-withdrawn' })
    expect((await stateOf(plain.piece)).stopped).toMatchObject({ why: 'lesson-withdrawn' })
    expect((await stateOf(ruths.piece)).stopped).toBeNull()
    expect(await kindsOf(finished)).not.toContain('stop.called')
    expect(await kindsOf(devs.piece)).toEqual(['piece.started', 'stop.called'])
    await backInUse(desk.db, world.who.imran, ulid(), world.lessonId, { id: ulid(), revision: world.revisionId }, later(2))
    expect((await stateOf(devs.piece)).stopped).toBeNull()
    expect(await kindsOf(devs.piece)).toEqual(['piece.started', 'stop.called', 'stop.lifted'])
  })

  it('withdrawn plainly stops nothing', async () => {
    const amys = new Tablet(world, world.who.amy)
    await amys.send([amys.begin(later(3))], later(3))
    await withdraw(desk.db, world.who.ruth, ulid(), world.lessonId, { id: ulid(), revision: world.revisionId, danger: false }, later(4))
    expect((await stateOf(amys.piece)).stopped).toBeNull()
  })
})
