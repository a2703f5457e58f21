import { and, asc, desc, eq, ne } from 'drizzle-orm'
import { ulid } from 'ulid'
import { titleOf } from '../../shared/lesson/titles'
import type { REVISION_ACTS } from '../../shared/schemas/lists'
import type { LessonView, RevisionRow } from '../../shared/types/lessons'
import type { Db, DbOrTx, Tx } from '../db/client'
import { inTransaction } from '../db/transaction'
import { lessons, revisionActs, revisions } from '../db/schema/lessons'
import { pieces } from '../db/schema/pieces'
import type { Actor } from './actor'
import { draftOf } from './drafts'
import { openLedger } from './ledger'
import { lessonOf, stageOf } from './lessons'
import { namesOf } from './names'
import { actOnPiece } from './piece-acts'
import { found, refuse } from './refuse'
import { append, type RegisterAct } from './register'

type ActName = (typeof REVISION_ACTS)[number]
export type RevisionRecord = typeof revisions.$inferSelect

/** A revision of this studio, or 404. It never changes. */
export async function revisionById(db: DbOrTx, studioId: string, id: string): Promise<RevisionRecord> {
  const [row] = await db.select().from(revisions).where(and(eq(revisions.studioId, studioId), eq(revisions.id, id)))
  return found(row)
}

/** The revision of a lesson that is in use, or null where none is. 404 for a lesson the studio has not. */
export async function currentRevision(db: DbOrTx, studioId: string, lessonId: string): Promise<RevisionRecord | null> {
  const [lesson] = await db.select({ current: lessons.currentRevision }).from(lessons).where(and(eq(lessons.studioId, studioId), eq(lessons.id, lessonId)))
  const { current } = found(lesson)
  return current ? await revisionById(db, studioId, current) : null
}

/** A lesson as its page shows it: the revision asked for, else the one in use, else the last; all revisions, newest first. */
export async function lessonView(db: Db, studioId: string, address: string, number?: number): Promise<LessonView> {
  const lesson = await lessonOf(db, studioId, address)
  const draft = await draftOf(db, studioId, lesson.id)
  const rows = await revisionRows(db, studioId, lesson.id, draft.savedBy)
  const wanted = number === undefined ? rows.list.find(row => row.id === lesson.currentRevision) ?? rows.list[0] : found(rows.list.find(row => row.number === number))
  const full = wanted ? await revisionById(db, studioId, wanted.id) : null
  const inForce = lesson.currentRevision ?? draft.baseRevision
  const base = inForce ? await revisionById(db, studioId, inForce) : null
  return {
    lesson: { id: lesson.id, slug: lesson.slug, craft: lesson.craft, stage: stageOf(lesson, rows.list.length), title: full?.title ?? titleOf(draft.source) ?? lesson.slug },
    shown: wanted && full ? { revision: wanted, compiled: full.compiled } : null,
    currentRevision: lesson.currentRevision, revisions: rows.list,
    draft: { savedAt: draft.savedAt.toISOString(), by: rows.names.get(draft.savedBy) ?? '', ahead: base?.source !== draft.source },
  }
}

async function revisionRows(db: Db, studioId: string, lessonId: string, alsoName: string): Promise<{ list: RevisionRow[], names: Map<string, string> }> {
  const made = await db.select({ id: revisions.id, number: revisions.number, title: revisions.title, at: revisions.at, by: revisions.by, effect: revisions.effect, note: revisions.note })
    .from(revisions).where(and(eq(revisions.studioId, studioId), eq(revisions.lessonId, lessonId))).orderBy(desc(revisions.number))
  const acts = await db.select({ revisionId: revisionActs.revisionId, act: revisionActs.act, by: revisionActs.by, at: revisionActs.at }).from(revisionActs)
    .innerJoin(revisions, and(eq(revisions.studioId, revisionActs.studioId), eq(revisions.id, revisionActs.revisionId)))
    .where(and(eq(revisionActs.studioId, studioId), eq(revisions.lessonId, lessonId))).orderBy(asc(revisionActs.at), asc(revisionActs.id))
  const names = await namesOf(db, [alsoName, ...made.map(row => row.by), ...acts.map(row => row.by)])
  const named = (id: string) => names.get(id) ?? ''
  const list = made.map(row => ({
    ...row, by: named(row.by), at: row.at.toISOString(),
    acts: acts.filter(act => act.revisionId === row.id).map(({ act, by, at }) => ({ act, by: named(by), at: at.toISOString() })),
  }))
  return { list, names }
}

const REGISTERED: Record<ActName, RegisterAct> = {
  'into-use': 'revision-into-use', 'withdrawn': 'revision-withdrawn', 'withdrawn-danger': 'revision-withdrawn-danger', 'back-in-use': 'revision-back-in-use',
}

/** Writes an act on a revision and its row of the register: the last thing of the transaction. */
export async function recordAct(tx: Tx, who: Actor, id: string, act: ActName, revision: Pick<RevisionRecord, 'id' | 'lessonId' | 'number' | 'sourceSha' | 'compiledSha' | 'effect'>, now: Date): Promise<void> {
  await tx.insert(revisionActs).values({ studioId: who.studioId, id, revisionId: revision.id, act, by: who.personId, at: now })
  const { lessonId, number, sourceSha, compiledSha, effect } = revision
  await append(tx, who, { act: REGISTERED[act], objectKind: 'revision', objectId: revision.id, body: { lesson: lessonId, number, source: sourceSha, compiled: compiledSha, effect }, at: now })
}

export interface RevisionAct { id: string, revision: string }

/** Was this act made before? The lesson's row is locked, so two presses come one after the other. */
async function lockForAct(tx: Tx, studioId: string, address: string, act: RevisionAct) {
  const { id: lessonId } = await lessonOf(tx, studioId, address)
  const [lesson] = await tx.select().from(lessons).where(and(eq(lessons.studioId, studioId), eq(lessons.id, lessonId))).for('update')
  const revision = await revisionById(tx, studioId, act.revision)
  if (revision.lessonId !== lessonId) found(null)
  const [there] = await tx.select({ id: revisionActs.id }).from(revisionActs).where(and(eq(revisionActs.studioId, studioId), eq(revisionActs.id, act.id)))
  return { lesson: found(lesson), revision, isDone: there !== undefined }
}

/**
 * Takes a revision out of use. Pieces on the bench go on with it, unless it is withdrawn for danger: then each is stopped
 * at once (but for the withdrawer's own, which nobody can stop for themselves). The same act again changes nothing.
 */
export async function withdraw(db: Db, who: Actor, tablet: string, address: string, act: RevisionAct & { danger: boolean }, now: Date): Promise<void> {
  await inTransaction(db, async (tx) => {
    const { lesson, revision, isDone } = await lockForAct(tx, who.studioId, address, act)
    if (isDone) return
    const last = await lastAct(tx, who.studioId, revision.id)
    if (last === 'withdrawn-danger' || (last === 'withdrawn' && !act.danger)) refuse(409, `Revision ${revision.number} is already withdrawn.`)
    if (lesson.currentRevision === revision.id) await setCurrent(tx, who.studioId, lesson.id, null)
    if (act.danger) await stopPieces(tx, who, tablet, revision.id, now)
    await recordAct(tx, who, act.id, act.danger ? 'withdrawn-danger' : 'withdrawn', revision, now)
  })
}

/** Puts a withdrawn or an earlier revision back in use, in place of the one that is. Pieces its danger had stopped go on. */
export async function backInUse(db: Db, who: Actor, tablet: string, address: string, act: RevisionAct, now: Date): Promise<void> {
  await inTransaction(db, async (tx) => {
    const { lesson, revision, isDone } = await lockForAct(tx, who.studioId, address, act)
    if (isDone) return
    if (lesson.currentRevision === revision.id) refuse(409, `Revision ${revision.number} is in use.`)
    if (lesson.putAwayAt) refuse(409, 'This lesson is put away. Take it out first.')
    await setCurrent(tx, who.studioId, lesson.id, revision.id)
    if (await lastAct(tx, who.studioId, revision.id) === 'withdrawn-danger') await letPiecesGoOn(tx, who, tablet, revision.id, now)
    await recordAct(tx, who, act.id, 'back-in-use', revision, now)
  })
}

/** Which revision new pieces of a lesson begin on. */
export async function setCurrent(tx: Tx, studioId: string, lessonId: string, revisionId: string | null): Promise<void> {
  await tx.update(lessons).set({ currentRevision: revisionId }).where(and(eq(lessons.studioId, studioId), eq(lessons.id, lessonId)))
}

async function lastAct(tx: Tx, studioId: string, revisionId: string): Promise<ActName | null> {
  const [row] = await tx.select({ act: revisionActs.act }).from(revisionActs).where(and(eq(revisionActs.studioId, studioId), eq(revisionActs.revisionId, revisionId)))
    .orderBy(desc(revisionActs.at), desc(revisionActs.id)).limit(1)
  return row?.act ?? null
}

async function atBench(tx: Tx, who: Actor, revisionId: string): Promise<string[]> {
  const rows = await tx.select({ id: pieces.id }).from(pieces)
    .where(and(eq(pieces.studioId, who.studioId), eq(pieces.revisionId, revisionId), eq(pieces.status, 'at-bench'), ne(pieces.personId, who.personId))).orderBy(asc(pieces.id))
  return rows.map(row => row.id)
}

async function stopPieces(tx: Tx, who: Actor, tablet: string, revisionId: string, now: Date): Promise<void> {
  for (const pieceId of await atBench(tx, who, revisionId)) {
    // Locked before it is asked: it may have been finished since the list was read.
    const ledger = await openLedger(tx, who.studioId, pieceId)
    if (ledger?.row.status !== 'at-bench' || ledger.folded.state.stopped) continue
    await actOnPiece(tx, who, { pieceId, tablet, id: ulid(now.getTime()), kind: 'stop.called', body: { why: 'lesson-withdrawn', words: null } }, now)
  }
}

async function letPiecesGoOn(tx: Tx, who: Actor, tablet: string, revisionId: string, now: Date): Promise<void> {
  for (const pieceId of await atBench(tx, who, revisionId)) {
    const ledger = await openLedger(tx, who.studioId, pieceId)
    if (ledger?.row.status !== 'at-bench' || ledger.folded.state.stopped?.why !== 'lesson-withdrawn') continue
    await actOnPiece(tx, who, { pieceId, tablet, id: ulid(now.getTime()), kind: 'stop.lifted', body: { words: null } }, now)
  }
}
