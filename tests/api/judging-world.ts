/** A small studio of its own for the judging tests: real events through the real services, and nothing shared with other tests. */
import { and, eq } from 'drizzle-orm'
import { ulid } from 'ulid'
import { type Bodies, decimal, type EventKind, type PieceStarted } from '#shared/bench/events'
import { plan, planSha } from '#shared/bench/machine'
import { shaOf, sha256 } from '#shared/lesson/canonical'
import { FIGURE_ENGINE, type Lesson } from '#shared/lesson/schema'
import type { JudgementBody } from '#shared/schemas/judging'
import type { Role } from '#shared/schemas/lists'
import type { Db } from '#server/db/client'
import { classLessons, lessons, revisionActs, revisions } from '#server/db/schema/lessons'
import { people, personNames } from '#server/db/schema/people'
import { pieces } from '#server/db/schema/pieces'
import { classes, classPeople, memberships, studios } from '#server/db/schema/studio'
import { inTransaction } from '#server/db/transaction'
import { founding } from '#server/services/names-under'
import { takeIn } from '#server/services/pieces'
import { writeSignOff } from '#server/services/sign-offs'
import type { Actor } from '#server/services/actor'
import { judged, lesson, mm, reading, start } from '../unit/judging/lesson'

export const ZONE = 'Europe/London'
export const DAY = 86_400_000

/** The lesson of the tests: two essential lines (one measured), one seen live, one that is not essential. */
export const wrappedLoop = (more: Partial<Lesson> = {}): Lesson => lesson({
  readings: [reading('first')],
  criteria: [judged('plane', { says: 'Loops in one plane', how: 'Eye' }), judged('bead', { says: 'Bead unmarked', how: '10x', essential: true }),
    judged('loop', { by: 'measure', reading: 'first', says: 'First loop to size', within: mm(0.2) }), judged('safe', { says: 'Eye protection on', live: true, essential: true })],
  closing: [], faults: [{ key: 'tight', sees: [{ t: 'text', v: 'The bead is tight' }], because: [{ t: 'text', v: 'the neck was too short' }], do: [{ t: 'text', v: 'Remake with a longer neck.' }], when: null, range: { from: 0, to: 0, line: 1 } }],
  ...more,
})

export interface World { db: Db, studioId: string, classId: string, lessonId: string, revisionId: string, lesson: Lesson, who: Record<Name, Actor> }
export const NAMES = { ruth: 'Ruth Calder', imran: 'Imran Sethi', dilys: 'Dilys Pugh', owen: 'Owen Tait', dev: 'Dev Rana', amy: 'Amy Brandt' } as const
export type Name = keyof typeof NAMES
const ROLES_OF: Record<Name, Role[]> = { ruth: ['instructor'], imran: ['instructor'], dilys: ['instructor'], owen: ['manager'], dev: ['apprentice'], amy: ['apprentice'] }

/** A person with a name and no password: nobody comes in as them but through the services. */
async function addPerson(db: Db, studioId: string, name: string, roles: Role[], trailNo: number, at: Date): Promise<Actor> {
  const personId = ulid()
  await db.insert(people).values({ id: personId, wants: {} })
  await db.insert(personNames).values({ personId, version: 1, name, fromAt: at })
  await db.insert(memberships).values({ studioId, id: ulid(), personId, trailNo, roles, joined: at })
  return { studioId, personId, roles }
}

/** Puts a lesson into use in the studio, and into its class. */
export async function addLesson(world: Pick<World, 'db' | 'studioId' | 'classId'>, by: Actor, slug: string, value: Lesson, at: Date): Promise<{ lessonId: string, revisionId: string }> {
  const { db, studioId, classId } = world
  const [lessonId, revisionId] = [ulid(), ulid()]
  await db.insert(lessons).values({ studioId, id: lessonId, slug, craft: value.craft, owner: by.personId, currentRevision: revisionId })
  await db.insert(revisions).values({
    studioId, id: revisionId, lessonId, number: 1, source: `# ${value.title}`, sourceSha: sha256(slug), compiled: value, compiledSha: shaOf(value), format: 1, compiler: 1, engine: 1,
    title: value.title, effect: 'first', note: '', by: by.personId, at,
  })
  await db.insert(revisionActs).values({ studioId, id: ulid(), revisionId, act: 'into-use', by: by.personId, at })
  await db.insert(classLessons).values({ studioId, id: ulid(), classId, lessonId, place: 1 })
  return { lessonId, revisionId }
}

/** A level on record, with both names from 4 on, as if it had been signed long ago. */
export async function giveLevel(world: World, name: Name, level: number, at: Date, of: { lessonId: string, revisionId: string } = world): Promise<string> {
  const { db, who } = world
  const id = ulid()
  const given = { personId: who[name].personId, lessonId: of.lessonId, revisionId: of.revisionId, level, byLevel: 5, judgements: [], words: '' }
  await inTransaction(db, async (tx) => {
    await writeSignOff(tx, who.ruth, { ...given, id, of: id, kind: 'sign' }, at)
    if (level >= 4) await writeSignOff(tx, name === 'dilys' ? who.imran : who.dilys, { ...given, id: ulid(), of: id, kind: 'countersign' }, at)
  })
  return id
}

/** A studio with a lesson in which Ruth holds a founding 5, Imran and Dilys 4 with both names. */
export async function makeWorld(db: Db, at: Date, value: Lesson = wrappedLoop()): Promise<World> {
  const [studioId, classId] = [ulid(), ulid()]
  await db.insert(studios).values({ id: studioId, slug: `judging-${studioId.toLowerCase()}`, name: 'Tallow Yard Bench School', zone: ZONE, timeMade: at })
  await db.insert(classes).values({ studioId, id: classId, name: 'Tuesday evening', termFrom: '2026-01-01', termTo: '2026-12-31', weekday: 2 })
  const add = (name: Name, trailNo: number) => addPerson(db, studioId, NAMES[name], ROLES_OF[name], trailNo, at)
  const who = { ruth: await add('ruth', 1), imran: await add('imran', 2), dilys: await add('dilys', 3), owen: await add('owen', 4), dev: await add('dev', 5), amy: await add('amy', 6) }
  for (const { personId } of [who.dev, who.amy]) await db.insert(classPeople).values({ studioId, classId, personId, fromOn: '2026-01-01' })
  const world: World = { db, studioId, classId, who, lesson: value, ...await addLesson({ db, studioId, classId }, who.ruth, 'wrapped-loop-link', value, at) }
  await founding(db, who.owen, { id: ulid(), person: who.ruth.personId, lesson: world.lessonId }, at)
  await giveLevel(world, 'imran', 4, at)
  await giveLevel(world, 'dilys', 4, at)
  return world
}

/** Events of one piece on one tablet, numbered as a tablet numbers them. */
export class Tablet {
  readonly id = ulid()
  readonly piece = ulid()
  readonly round = ulid()
  private seq = 0

  constructor(readonly world: World, readonly maker: Actor) {}

  event<K extends EventKind>(kind: K, body: Bodies[K], at: Date, id = ulid()): Record<string, unknown> {
    this.seq++
    return { id, piece: this.piece, round: this.round, tablet: this.id, seq: this.seq, actor: this.maker.personId, kind, v: 1, at: at.toISOString(), since: 1000, body }
  }

  async send(events: Record<string, unknown>[], at: Date): Promise<void> {
    const taken = await takeIn(this.world.db, this.maker, this.piece, { tablet: this.id, sentAt: at.toISOString(), events }, at)
    if (taken.refused) throw new Error(`${taken.refused.reason}: ${taken.refused.says}`)
  }

  begin(at: Date, more: Partial<PieceStarted> = {}): Record<string, unknown> {
    const { lesson: value, lessonId, revisionId } = this.world
    const begun = start({ lesson: lessonId, revision: revisionId, compiled: shaOf(value), engine: FIGURE_ENGINE, level: 0, ...more })
    const planned = plan(value, begun)
    if (!planned.ok) throw new Error(planned.says)
    return this.event('piece.started', { ...begun, plan: planSha(planned.turns) }, at, this.round)
  }

  /** All steps done and the loop measured. */
  work(at: Date, across = 4.4): Record<string, unknown>[] {
    const turns = this.world.lesson.parts.flatMap(part => part.steps.flatMap(step => step.repeat ? [`${step.key}@1.1`, `${step.key}@1.2`] : [step.key]))
    return [...turns.map(turn => this.event('step.done', { turn, early: false }, at)),
      this.event('reading.taken', { turn: turns[0] ?? null, reading: 'first', values: [decimal(across)], typed: [String(across)], unit: 'mm', gauge: 'Calliper' }, at)]
  }
}

/** A piece made from start to finish at a moment. */
export async function finishedPiece(world: World, at: Date, { maker = world.who.dev, across = 4.4, begin = {} }: { maker?: Actor, across?: number, begin?: Partial<PieceStarted> } = {}): Promise<string> {
  const tablet = new Tablet(world, maker)
  await tablet.send([tablet.begin(at, begin), ...tablet.work(at, across), tablet.event('piece.finished', {}, at)], at)
  return tablet.piece
}

/** What an instructor would send who found nothing wrong. */
export async function fairJudgement(world: World, piece: string, more: Partial<JudgementBody> = {}): Promise<JudgementBody> {
  const [row] = await world.db.select({ n: pieces.n, head: pieces.head }).from(pieces).where(and(eq(pieces.studioId, world.studioId), eq(pieces.id, piece)))
  if (!row) throw new Error('There is no such piece.')
  return {
    id: ulid(), piece, n: row.n, head: row.head, seen: 'holds', outcome: 'kept', level: null, faults: [], words: '', remake: [], inHand: false,
    marks: { plane: { says: 'yes' }, bead: { says: 'yes' }, loop: { value: '4.4' }, safe: { says: 'yes' } }, ...more,
  }
}
