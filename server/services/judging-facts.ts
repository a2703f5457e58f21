import { and, eq, inArray, or } from 'drizzle-orm'
import { dayIn } from '../../shared/bench/day'
import type { GateFacts, NeededLesson } from '../../shared/judging/gates'
import { lapse } from '../../shared/judging/lapse'
import { settingsAt, type JudgingSettings } from '../../shared/judging/settings'
import { type HeldLevel, NOTHING_HELD, type Pair } from '../../shared/judging/signer'
import type { Lesson } from '../../shared/lesson/schema'
import type { RelationKind } from '../../shared/schemas/lists'
import type { DbOrTx } from '../db/client'
import { standings } from '../db/schema/judging'
import { lessons, revisions } from '../db/schema/lessons'
import { relations } from '../db/schema/studio'
import type { Actor } from './actor'
import { type PieceJudged, piecesJudged } from './evidence'
import { currentNames, nameIn } from './names'
import { heldPermissions } from './permissions'
import { judgingSettingRows, zoneOf } from './standings'

/** The studio's numbers and its day, now. */
export interface Today { settings: JudgingSettings, today: string, zone: string }

export async function todayOf(db: DbOrTx, studioId: string, now: Date): Promise<Today> {
  const zone = await zoneOf(db, studioId)
  return { settings: settingsAt(await judgingSettingRows(db, studioId), now), today: dayIn(zone, now), zone }
}

const asHeld = (row: typeof standings.$inferSelect): HeldLevel => ({ levelSigned: row.levelSigned, aliveOn: row.aliveOn, keeps: row.keeps, oneSignature: row.oneSignature })

/** What a person holds on record, by lesson. */
export async function heldBy(db: DbOrTx, studioId: string, personId: string, lessonIds?: readonly string[]): Promise<Map<string, HeldLevel>> {
  const rows = await db.select().from(standings)
    .where(and(eq(standings.studioId, studioId), eq(standings.personId, personId), lessonIds ? inArray(standings.lessonId, [...lessonIds, '']) : undefined))
  return new Map(rows.map(row => [row.lessonId, asHeld(row)]))
}

/** Ties on record of one person, by the other. */
export async function tiesOf(db: DbOrTx, studioId: string, personId: string): Promise<Map<string, RelationKind>> {
  const rows = await db.select().from(relations).where(and(eq(relations.studioId, studioId), or(eq(relations.personA, personId), eq(relations.personB, personId))))
  return new Map(rows.map(row => [row.personA === personId ? row.personB : row.personA, row.kind]))
}

/** Signer and maker in one lesson, with all that forbids or allows the one to sign for the other. */
export async function pairOf(db: DbOrTx, who: Actor, makerId: string, lessonId: string, { settings, today }: Today): Promise<Pair> {
  const [held, ties, names] = [await heldBy(db, who.studioId, who.personId, [lessonId]), await tiesOf(db, who.studioId, who.personId), await currentNames(db, [makerId])]
  return {
    settings, today, tie: ties.get(makerId) ?? null, maker: { personId: makerId, name: nameIn(names, makerId).split(' ')[0] ?? '' },
    signer: { personId: who.personId, roles: who.roles, held: held.get(lessonId) ?? NOTHING_HELD },
  }
}

async function neededLessons(db: DbOrTx, studioId: string, makerId: string, lesson: Lesson, { settings, today }: Today): Promise<NeededLesson[]> {
  if (lesson.needs.length === 0) return []
  const rows = await db.select({ id: lessons.id, slug: lessons.slug, title: revisions.title }).from(lessons)
    .leftJoin(revisions, and(eq(revisions.studioId, lessons.studioId), eq(revisions.id, lessons.currentRevision)))
    .where(and(eq(lessons.studioId, studioId), inArray(lessons.slug, lesson.needs)))
  const held = await heldBy(db, studioId, makerId, rows.map(row => row.id))
  return lesson.needs.map((slug) => {
    const row = rows.find(one => one.slug === slug)
    return { slug, title: row ? row.title ?? slug : null, level: row ? lapse(held.get(row.id) ?? NOTHING_HELD, settings, today).level : 0 }
  })
}

export type FactsBefore = Omit<GateFacts, 'piece'>

/** All a gate asks but the piece in hand. `judged`: what was read already of the pieces before. */
export async function gateFacts(db: DbOrTx, who: Actor, makerId: string, lessonId: string, lesson: Lesson, now: Date, judged?: readonly PieceJudged[]): Promise<FactsBefore> {
  const today = await todayOf(db, who.studioId, now)
  const held = await heldBy(db, who.studioId, makerId, [lessonId])
  return {
    ...await pairOf(db, who, makerId, lessonId, today), held: held.get(lessonId) ?? NOTHING_HELD,
    needs: await neededLessons(db, who.studioId, makerId, lesson, today), permissions: await heldPermissions(db, who.studioId, makerId, lesson.permissions),
    before: (judged ?? await piecesJudged(db, who.studioId, makerId, lessonId)).map(one => one.evidence),
  }
}
