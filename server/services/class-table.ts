import { and, asc, eq, gte, inArray, isNull, lte, max, or, sql } from 'drizzle-orm'
import { dayIn } from '../../shared/bench/day'
import { barOf, cellOf, type CellFacts, talliesOf, type TableColumn, type TableRow, type Tally } from '../../shared/judging/class-table'
import { foldPermissions } from '../../shared/judging/permissions'
import type { Permission } from '../../shared/lesson/schema'
import type { Db } from '../db/client'
import { permissionActs, standings } from '../db/schema/judging'
import { classLessons, lessons, revisions } from '../db/schema/lessons'
import { pieces } from '../db/schema/pieces'
import { classPeople, memberships } from '../db/schema/studio'
import type { Actor } from './actor'
import { classOf } from './classes'
import { todayOf } from './judging-facts'
import { currentNames, nameIn } from './names'

export interface ClassTable { id: string, name: string, at: string, today: string, columns: TableColumn[], rows: TableRow[], tallies: Tally[] }

/** The class's people down, its lessons across, and where each stands: one query over the standings. */
export async function classTable(db: Db, who: Actor, classId: string, now: Date): Promise<ClassTable> {
  const { id, name } = await classOf(db, who.studioId, classId)
  const { settings, today, zone } = await todayOf(db, who.studioId, now)
  const columns = await columnsOf(db, who.studioId, classId)
  const cells = await tableQuery(db, who.studioId, classId, today)
  const people = [...new Map(cells.map(cell => [cell.person, cell.ageBand])).entries()]
  const names = await currentNames(db, people.map(([person]) => person))
  const last = await lastAtBench(db, who.studioId, people.map(([person]) => person), zone)
  const held = await permissionsOf(db, who.studioId, people.map(([person]) => person), columns.some(column => column.permissions.length > 0))
  const byCell = new Map(cells.map(cell => [`${cell.person} ${cell.lesson}`, cell.standing]))
  const rows = people.map(([person, ageBand]): TableRow => ({
    id: person, name: nameIn(names, person), lastAt: last.get(person) ?? null,
    cells: columns.map(({ id: lesson, permissions }) => cellOf({ person, lesson }, factsOf(byCell.get(`${person} ${lesson}`) ?? null, zone), barOf(permissions, held.get(person) ?? {}, ageBand, settings), settings, today)),
  })).sort((a, b) => a.name.localeCompare(b.name))
  return { id, name, at: now.toISOString(), today, columns: columns.map(({ permissions: _permissions, ...column }) => column), rows, tallies: talliesOf(rows, today) }
}

/** What each holds of the permissions; not asked where no lesson of the class needs one. */
async function permissionsOf(db: Db, studioId: string, people: readonly string[], isNeeded: boolean) {
  if (!isNeeded || people.length === 0) return new Map<string, ReturnType<typeof foldPermissions>>()
  const acts = await db.select({ person: permissionActs.personId, permission: permissionActs.permission, act: permissionActs.act }).from(permissionActs)
    .where(and(eq(permissionActs.studioId, studioId), inArray(permissionActs.personId, [...people]))).orderBy(asc(permissionActs.at), asc(permissionActs.id))
  return new Map(people.map(person => [person, foldPermissions(acts.filter(act => act.person === person))] as const))
}

async function columnsOf(db: Db, studioId: string, classId: string): Promise<(TableColumn & { permissions: Permission[] })[]> {
  const rows = await db.select({ id: lessons.id, slug: lessons.slug, title: revisions.title, permissions: sql<string | null>`JSON_EXTRACT(${revisions.compiled}, '$.permissions')` }).from(classLessons)
    .innerJoin(lessons, and(eq(lessons.studioId, classLessons.studioId), eq(lessons.id, classLessons.lessonId)))
    .leftJoin(revisions, and(eq(revisions.studioId, lessons.studioId), eq(revisions.id, lessons.currentRevision)))
    .where(and(eq(classLessons.studioId, studioId), eq(classLessons.classId, classId))).orderBy(asc(classLessons.place))
  return rows.map(({ permissions, title, ...row }) => ({ ...row, title: title ?? row.slug, permissions: typeof permissions === 'string' ? JSON.parse(permissions) : permissions ?? [] }))
}

/** The query of the table: people of the class today x its lessons, with the standing where there is one. */
export function tableQuery(db: Db, studioId: string, classId: string, today: string) {
  return db.select({ person: classPeople.personId, ageBand: memberships.ageBand, lesson: classLessons.lessonId, standing: standings }).from(classPeople)
    .innerJoin(memberships, and(eq(memberships.studioId, classPeople.studioId), eq(memberships.personId, classPeople.personId)))
    .leftJoin(classLessons, and(eq(classLessons.studioId, classPeople.studioId), eq(classLessons.classId, classPeople.classId)))
    .leftJoin(standings, and(eq(standings.studioId, classPeople.studioId), eq(standings.personId, classPeople.personId), eq(standings.lessonId, classLessons.lessonId)))
    .where(and(eq(classPeople.studioId, studioId), eq(classPeople.classId, classId), isNull(memberships.leftAt), lte(classPeople.fromOn, today), or(isNull(classPeople.untilOn), gte(classPeople.untilOn, today))))
}

function factsOf(row: typeof standings.$inferSelect | null, zone: string): CellFacts | null {
  return row ? { ...row, waitingOn: row.waitingSince ? dayIn(zone, row.waitingSince) : null } : null
}

/** The last day each of these people began or finished a piece. */
async function lastAtBench(db: Db, studioId: string, people: readonly string[], zone: string): Promise<Map<string, string>> {
  if (people.length === 0) return new Map()
  const rows = await db.select({ person: pieces.personId, started: max(pieces.startedAt), finished: max(pieces.finishedAt) }).from(pieces)
    .where(and(eq(pieces.studioId, studioId), inArray(pieces.personId, [...people]))).groupBy(pieces.personId)
  return new Map(rows.flatMap(({ person, started, finished }) => {
    const latest = Math.max(started?.getTime() ?? 0, finished?.getTime() ?? 0)
    return latest > 0 ? [[person, dayIn(zone, new Date(latest))] as const] : []
  }))
}
