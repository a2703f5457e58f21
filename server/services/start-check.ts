import { and, desc, eq, max } from 'drizzle-orm'
import { faultOfSize, KIND_OF_UNIT, textOf, valueOf } from '../../shared/bench/scope'
import { onceKnown, type OnceFact } from '../../shared/bench/once'
import type { PieceStarted } from '../../shared/bench/events'
import { plan, planSha, type Turn } from '../../shared/bench/machine'
import { workOut } from '../../shared/lesson/figures'
import { FIGURE_ENGINE, type Lesson } from '../../shared/lesson/schema'
import type { Tx } from '../db/client'
import { classLessons, revisionActs, revisions } from '../db/schema/lessons'
import { signOffs } from '../db/schema/judging'
import { pieces } from '../db/schema/pieces'
import { classPeople } from '../db/schema/studio'
import type { Actor } from './actor'
import { isState } from './ledger'

export type StartRefusal = { reason: string, says: string }
const no = (reason: string, says: string): StartRefusal => ({ reason, says })

export interface StartFound { lesson: Lesson, turns: Turn[], stoppedBy: string | null }

/** Whether a piece may begin as the tablet says: what only the server can know. What changed meanwhile is no reason to refuse. */
export async function checkStart(tx: Tx, who: Actor, start: PieceStarted): Promise<StartFound | StartRefusal> {
  const [revision] = await tx.select().from(revisions).where(and(eq(revisions.studioId, who.studioId), eq(revisions.id, start.revision), eq(revisions.lessonId, start.lesson)))
  const acts = revision ? await tx.select().from(revisionActs).where(and(eq(revisionActs.studioId, who.studioId), eq(revisionActs.revisionId, start.revision))).orderBy(desc(revisionActs.at)) : []
  if (!revision || !acts.some(act => act.act === 'into-use')) return no('unknown-revision', 'This studio has no such lesson in use.')
  if (!await isTheirs(tx, who, start.lesson)) return no('not-their-lesson', 'This lesson is not one of your classes’.')
  if (revision.compiledSha !== start.compiled) return no('other-lesson', 'The lesson on this tablet is not the one that was put into use.')
  const lesson = revision.compiled
  const fault = faultOfSizes(lesson, start) ?? faultOfFigures(lesson, start)
  if (fault) return fault
  if (!onceKnown(lesson, start, await earlierPieces(tx, who, start))) return no('once-not-known', 'A hold of this stick was not passed before, so it must be asked.')
  const level = await highestLevel(tx, who, start.lesson)
  if (start.level > level) return no('level-too-high', 'The level told is higher than any that was signed.')
  const planned = plan(lesson, start)
  if (!planned.ok) return no('no-plan', planned.says)
  if (planSha(planned.turns) !== start.plan) return no('other-plan', 'The steps on this tablet are not the steps of this lesson.')
  return { lesson, turns: planned.turns, stoppedBy: acts[0]?.act === 'withdrawn-danger' ? acts[0].by : null }
}

/** Is or was the lesson one of the person's classes'? Who teaches may make a piece of any lesson of the studio. */
async function isTheirs(tx: Tx, who: Actor, lessonId: string): Promise<boolean> {
  if (who.roles.includes('instructor')) return true
  const rows = await tx.select({ id: classLessons.id }).from(classLessons)
    .innerJoin(classPeople, and(eq(classPeople.studioId, classLessons.studioId), eq(classPeople.classId, classLessons.classId)))
    .where(and(eq(classLessons.studioId, who.studioId), eq(classLessons.lessonId, lessonId), eq(classPeople.personId, who.personId))).limit(1)
  return rows.length > 0
}

function faultOfSizes(lesson: Lesson, start: PieceStarted): StartRefusal | null {
  for (const size of lesson.sizes) {
    const says = faultOfSize(size, start.sizes[size.name])
    if (says) return no('bad-size', says)
  }
  return null
}

const SAME = 1e-9

/** Figures are worked out again. Another engine's are taken as they are; the judge is shown that they were not checked. */
function faultOfFigures(lesson: Lesson, start: PieceStarted): StartRefusal | null {
  if (start.engine !== FIGURE_ENGINE) return null
  const sizes = Object.fromEntries(lesson.sizes.flatMap((size) => {
    const value = valueOf(start.sizes[size.name]?.value ?? '', KIND_OF_UNIT[size.unit])
    return value ? [[size.name, value.value]] : []
  }))
  const worked = workOut(lesson, sizes)
  for (const figure of lesson.figures) {
    const own = worked.figures[figure.name]
    const told = start.figures[figure.name]
    if (!own || told === undefined) return no('bad-figure', `${figure.name} has no value with these sizes.`)
    const same = typeof own.value === 'number' ? Math.abs(Number(told) - own.value) <= SAME * Math.max(1e-3, Math.abs(own.value)) : textOf(own) === told
    if (!same) return no('other-figure', `${figure.name} was worked out otherwise here.`)
  }
  return null
}

/** The highest level this person was ever signed at in this lesson. */
export async function highestLevel(tx: Tx, who: Actor, lessonId: string): Promise<number> {
  const [row] = await tx.select({ level: max(signOffs.level) }).from(signOffs)
    .where(and(eq(signOffs.studioId, who.studioId), eq(signOffs.personId, who.personId), eq(signOffs.lessonId, lessonId)))
  return row?.level ?? 0
}

/** The person's last pieces of this revision, as far as holds of the stick and of the evening go. */
async function earlierPieces(tx: Tx, who: Actor, start: PieceStarted): Promise<OnceFact[]> {
  if (start.once.passed.length === 0 && Object.keys(start.once.samples).length === 0) return []
  const rows = await tx.select({ state: pieces.state }).from(pieces)
    .where(and(eq(pieces.studioId, who.studioId), eq(pieces.personId, who.personId), eq(pieces.revisionId, start.revision))).orderBy(desc(pieces.startedAt)).limit(20)
  return rows.flatMap(row => isState(row.state) && row.state.start ? [{ state: row.state }] : [])
}
