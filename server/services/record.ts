import { and, asc, desc, eq } from 'drizzle-orm'
import { dayIn } from '../../shared/bench/day'
import { lapse } from '../../shared/judging/lapse'
import { may } from '../../shared/judging/roles'
import type { LessonHeld, PersonRecord, RecordAct, RecordPermission, RecordPiece } from '../../shared/types/record'
import type { Db } from '../db/client'
import { judgements, signOffs, standings } from '../db/schema/judging'
import { lessons, revisions } from '../db/schema/lessons'
import { pieces } from '../db/schema/pieces'
import { memberships } from '../db/schema/studio'
import type { Actor } from './actor'
import { todayOf, type Today } from './judging-facts'
import { currentNames, nameIn } from './names'
import { permissionsView } from './permissions'
import { found } from './refuse'
import { readWords } from './words'

/** A person's record in this studio: their own, or for who may see pieces or records. 404 for everyone else. */
export async function personRecord(db: Db, who: Actor, personId: string, now: Date): Promise<PersonRecord> {
  const [member] = await db.select().from(memberships).where(and(eq(memberships.studioId, who.studioId), eq(memberships.personId, personId)))
  found(member)
  if (personId !== who.personId && !may(who.roles, 'see-pieces') && !may(who.roles, 'see-record')) found(null)
  const day = await todayOf(db, who.studioId, now)
  const held = await heldLevels(db, who.studioId, personId, day)
  const acts = await actsOf(db, who.studioId, personId, day.zone)
  const names = await currentNames(db, [personId, ...acts.map(act => act.by)])
  return {
    person: { id: personId, name: nameIn(names, personId), since: dayIn(day.zone, member?.joined ?? now) }, today: day.today, permissions: await permissionsOf(db, who, personId, day.zone), held,
    acts: acts.map(act => ({ ...act, by: nameIn(names, act.by) })), pieces: await piecesOf(db, who.studioId, personId, day.zone),
  }
}

/** Every permission that was ever acted on, with the act it stands on now. */
async function permissionsOf(db: Db, who: Actor, personId: string, zone: string): Promise<RecordPermission[]> {
  const view = await permissionsView(db, who, personId)
  return view.held.flatMap(({ permission, state }) => {
    const act = view.acts.filter(one => one.permission === permission).at(-1)
    return act ? [{ permission, state, by: act.by, on: dayIn(zone, new Date(act.at)), limit: act.limit, says: act.words }] : []
  })
}

async function heldLevels(db: Db, studioId: string, personId: string, { settings, today }: Today): Promise<LessonHeld[]> {
  const rows = await db.select({ standing: standings, slug: lessons.slug, title: revisions.title, signedBy: signOffs.by, kind: signOffs.kind, signOff: signOffs.id }).from(standings)
    .innerJoin(lessons, and(eq(lessons.studioId, standings.studioId), eq(lessons.id, standings.lessonId)))
    .leftJoin(revisions, and(eq(revisions.studioId, lessons.studioId), eq(revisions.id, lessons.currentRevision)))
    .leftJoin(signOffs, and(eq(signOffs.studioId, standings.studioId), eq(signOffs.id, standings.signOffId)))
    .where(and(eq(standings.studioId, studioId), eq(standings.personId, personId)))
  const names = await currentNames(db, rows.flatMap(row => row.signedBy ? [row.signedBy] : []))
  return rows.filter(row => row.standing.levelSigned > 0).map(({ standing, slug, title, signedBy, kind, signOff }) => {
    const { level, state, until } = lapse(standing, settings, today)
    return { lesson: standing.lessonId, title: title ?? slug, level, state, until, oneSignature: standing.oneSignature, signedOn: standing.signedOn, signedBy: signedBy ? nameIn(names, signedBy) : null, isFounding: kind === 'founding', signOff }
  }).sort((a, b) => b.level - a.level || a.title.localeCompare(b.title))
}

/** Sign-offs and refusals in time order; nothing is left out. */
async function actsOf(db: Db, studioId: string, personId: string, zone: string): Promise<RecordAct[]> {
  const signs = await db.select({ id: signOffs.id, at: signOffs.at, day: signOffs.onDay, level: signOffs.level, kind: signOffs.kind, by: signOffs.by, byLevel: signOffs.byLevel, lesson: signOffs.lessonId, title: revisions.title, revision: revisions.number }).from(signOffs)
    .innerJoin(revisions, and(eq(revisions.studioId, signOffs.studioId), eq(revisions.id, signOffs.revisionId)))
    .where(and(eq(signOffs.studioId, studioId), eq(signOffs.personId, personId))).orderBy(asc(signOffs.at))
  const refused = await db.select({ id: judgements.id, at: judgements.at, by: judgements.by, byLevel: judgements.signerLevel, lesson: pieces.lessonId, piece: pieces.label, title: revisions.title, revision: revisions.number, words: judgements.wordsId }).from(judgements)
    .innerJoin(pieces, and(eq(pieces.studioId, judgements.studioId), eq(pieces.id, judgements.pieceId)))
    .innerJoin(revisions, and(eq(revisions.studioId, pieces.studioId), eq(revisions.id, pieces.revisionId)))
    .where(and(eq(judgements.studioId, studioId), eq(pieces.personId, personId), eq(judgements.outcome, 'sent-back'))).orderBy(asc(judgements.at))
  const words = await readWords(db, studioId, refused.flatMap(row => row.words ? [row.words] : []))
  return [
    ...signs.map(({ at, ...sign }): RecordAct => ({ ...sign, at: at.toISOString(), says: null, piece: null })),
    ...refused.map(({ at, words: id, ...row }): RecordAct => ({ ...row, at: at.toISOString(), day: dayIn(zone, at), level: null, kind: 'sent-back', says: id ? words.get(id) ?? null : null })),
  ].sort((a, b) => a.at < b.at ? -1 : 1)
}

async function piecesOf(db: Db, studioId: string, personId: string, zone: string): Promise<RecordPiece[]> {
  const rows = await db.select({ id: pieces.id, label: pieces.label, lesson: pieces.lessonId, title: revisions.title, status: pieces.status, startedAt: pieces.startedAt, finishedOn: pieces.finishedOn, turnsDone: pieces.turnsDone, turnsAll: pieces.turnsAll, practice: pieces.practice, material: pieces.material })
    .from(pieces).innerJoin(revisions, and(eq(revisions.studioId, pieces.studioId), eq(revisions.id, pieces.revisionId)))
    .where(and(eq(pieces.studioId, studioId), eq(pieces.personId, personId))).orderBy(desc(pieces.startedAt))
  return rows.map(({ startedAt, ...row }) => ({ ...row, startedOn: dayIn(zone, startedAt) }))
}
