import { and, eq, ne } from 'drizzle-orm'
import { foundingReasons, secondNameReasons } from '../../shared/judging/names'
import type { Db, Tx } from '../db/client'
import { signOffPieces, signOffs } from '../db/schema/judging'
import { lessons, revisions } from '../db/schema/lessons'
import { memberships } from '../db/schema/studio'
import type { Actor } from './actor'
import { lessonsHeld } from './founding-view'
import { pairOf, todayOf } from './judging-facts'
import { queueMail } from './mail'
import { currentNames, nameIn } from './names'
import { found, refuse } from './refuse'
import { lockPerson, onlyOnce, ownSignOff, type SignedOnce, standingLevel, writeSignOff } from './sign-offs'
import { readStanding } from './standings'

/** Puts the second name under a level that stands on one signature. Never the first signer's, never the maker's. */
export async function secondName(db: Db, who: Actor, signOffId: string, id: string, now: Date): Promise<SignedOnce> {
  return await onlyOnce(db, who, id, tx => secondNameIn(tx, who, signOffId, id, now))
}

async function secondNameIn(tx: Tx, who: Actor, signOffId: string, id: string, now: Date): Promise<SignedOnce> {
  const ofStudio = and(eq(signOffs.studioId, who.studioId), eq(signOffs.id, signOffId))
  const [about] = await tx.select().from(signOffs).where(ofStudio)
  const first = found(about)
  await lockPerson(tx, who.studioId, first.personId)
  const there = await ownSignOff(tx, who, id)
  if (there) return there
  const today = await todayOf(tx, who.studioId, now)
  const named = await tx.select({ by: signOffs.by }).from(signOffs).where(and(eq(signOffs.studioId, who.studioId), eq(signOffs.of, signOffId), eq(signOffs.kind, 'countersign')))
  const standing = await readStanding(tx, who.studioId, first.personId, first.lessonId)
  const reasons = secondNameReasons({
    ...await pairOf(tx, who, first.personId, first.lessonId, today), named: named.map(row => row.by),
    signOff: { by: first.by, level: first.level, kind: first.kind, isInForce: standing?.signOffId === first.id },
  })
  const [reason] = reasons
  if (reason) refuse(reason.code === 'named-twice' ? 409 : 403, reason.says, { reasons })
  const rests = await tx.select({ id: signOffPieces.judgementId }).from(signOffPieces).where(and(eq(signOffPieces.studioId, who.studioId), eq(signOffPieces.signOffId, signOffId)))
  const [revision] = await tx.select({ title: revisions.title }).from(revisions).where(and(eq(revisions.studioId, who.studioId), eq(revisions.id, first.revisionId)))
  await queueMail(tx, { studioId: who.studioId, toPerson: first.personId, kind: 'second-name', body: { lesson: revision?.title ?? '', level: first.level, by: who.personId }, dedupeKey: `second-name ${id}` }, now)
  const row = await writeSignOff(tx, who, {
    id, of: signOffId, kind: 'countersign', personId: first.personId, lessonId: first.lessonId, revisionId: first.revisionId, level: first.level,
    byLevel: await standingLevel(tx, who, first.lessonId, now), judgements: rests.map(one => one.id), words: '',
  }, now)
  return { row, needsSecondName: false, isNew: true }
}

/**
 * A level 5 (or 4, for who gives second names) given by the manager where nobody holds 5, or before anyone was signed in the
 * lesson, so that somebody can sign first. Shown as such for ever.
 */
export async function founding(db: Db, who: Actor, given: Founded, now: Date): Promise<SignedOnce> {
  return await onlyOnce(db, who, given.id, tx => foundingIn(tx, who, given, now))
}

export interface Founded { id: string, person: string, lesson: string, level?: 4 | 5 }

async function foundingIn(tx: Tx, who: Actor, { id, person, lesson, level = 5 }: Founded, now: Date): Promise<SignedOnce> {
  // Two founding levels of one lesson at once: the lesson's row is the lock.
  const [row] = await tx.select({ revision: lessons.currentRevision }).from(lessons).where(and(eq(lessons.studioId, who.studioId), eq(lessons.id, lesson))).for('update')
  const revisionId = found(row).revision
  if (!revisionId) refuse(422, 'This lesson is not in use yet. Put it into use first.')
  await lockPerson(tx, who.studioId, person)
  const there = await ownSignOff(tx, who, id)
  if (there) return there
  const [member] = await tx.select({ roles: memberships.roles, leftAt: memberships.leftAt }).from(memberships).where(and(eq(memberships.studioId, who.studioId), eq(memberships.personId, person)))
  const holder = found(member)
  const names = await currentNames(tx, [person])
  const reasons = foundingReasons({ roles: who.roles, holder: { name: nameIn(names, person), roles: holder.leftAt ? [] : holder.roles }, isHeld: await isTaught(tx, who, lesson) && (await lessonsHeld(tx, who.studioId, now)).has(lesson) })
  const [reason] = reasons
  if (reason) refuse(reason.code === 'not-manager' ? 403 : 422, reason.says, { reasons })
  return { row: await writeSignOff(tx, who, { id, of: id, kind: 'founding', personId: person, lessonId: lesson, revisionId, level, byLevel: 0, judgements: [], words: '' }, now), needsSecondName: false, isNew: true }
}

/** Was anybody signed in this lesson by someone who teaches it? */
async function isTaught(tx: Tx, who: Actor, lesson: string): Promise<boolean> {
  const rows = await tx.select({ id: signOffs.id }).from(signOffs).where(and(eq(signOffs.studioId, who.studioId), eq(signOffs.lessonId, lesson), ne(signOffs.kind, 'founding'))).limit(1)
  return rows.length > 0
}
