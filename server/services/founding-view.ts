import { and, asc, eq, isNull, ne } from 'drizzle-orm'
import { lapse } from '../../shared/judging/lapse'
import { may } from '../../shared/judging/roles'
import type { FoundingView } from '../../shared/types/judging'
import type { DbOrTx } from '../db/client'
import { signOffs, standings } from '../db/schema/judging'
import { lessons, revisions } from '../db/schema/lessons'
import { memberships } from '../db/schema/studio'
import type { Actor } from './actor'
import { todayOf } from './judging-facts'
import { currentNames, nameIn } from './names'

/** The lessons in which somebody who is still here holds 5 today, with both names where it takes them. */
export async function lessonsHeld(db: DbOrTx, studioId: string, now: Date): Promise<Set<string>> {
  const { settings, today } = await todayOf(db, studioId, now)
  const rows = await db.select({ standing: standings }).from(standings)
    .innerJoin(memberships, and(eq(memberships.studioId, standings.studioId), eq(memberships.personId, standings.personId)))
    .where(and(eq(standings.studioId, studioId), eq(standings.levelSigned, 5), isNull(memberships.leftAt)))
  return new Set(rows.filter(({ standing }) => !standing.oneSignature && lapse(standing, settings, today).level === 5).map(row => row.standing.lessonId))
}

/** Lessons in use that nobody may sign in or in which nobody was signed yet, and the instructors one of whom may be given the founding level. */
export async function foundingView(db: DbOrTx, who: Actor, now: Date): Promise<FoundingView> {
  const held = await lessonsHeld(db, who.studioId, now)
  const taught = new Set((await db.selectDistinct({ id: signOffs.lessonId }).from(signOffs).where(and(eq(signOffs.studioId, who.studioId), ne(signOffs.kind, 'founding')))).map(row => row.id))
  const rows = await db.select({ id: lessons.id, title: revisions.title }).from(lessons)
    .innerJoin(revisions, and(eq(revisions.studioId, lessons.studioId), eq(revisions.id, lessons.currentRevision)))
    .where(and(eq(lessons.studioId, who.studioId), isNull(lessons.putAwayAt))).orderBy(asc(revisions.title))
  const people = await db.select({ id: memberships.personId, roles: memberships.roles }).from(memberships).where(and(eq(memberships.studioId, who.studioId), isNull(memberships.leftAt)))
  const able = people.filter(person => may(person.roles, 'sign'))
  const names = await currentNames(db, able.map(person => person.id))
  return { lessons: rows.filter(row => !held.has(row.id) || !taught.has(row.id)), instructors: able.map(({ id }) => ({ id, name: nameIn(names, id) })).sort((a, b) => a.name.localeCompare(b.name)) }
}
