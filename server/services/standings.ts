import { and, asc, desc, eq, ne, sql } from 'drizzle-orm'
import { alias } from 'drizzle-orm/mysql-core'
import { dayIn } from '../../shared/bench/day'
import { JUDGING_SETTINGS_KEY, settingsAt } from '../../shared/judging/settings'
import { isBlank, standingOf, type Standing, type StandingFacts } from '../../shared/judging/standing'
import type { DbOrTx, Tx } from '../db/client'
import { judgements, signOffs, standings } from '../db/schema/judging'
import { revisionReads, revisions } from '../db/schema/lessons'
import { pieces } from '../db/schema/pieces'
import { settings, studios } from '../db/schema/studio'

/** Every value the studio's judging settings ever had, to read them as of any day. */
export async function judgingSettingRows(db: DbOrTx, studioId: string): Promise<{ fromAt: Date, value: unknown }[]> {
  return await db.select({ fromAt: settings.fromAt, value: settings.value }).from(settings)
    .where(and(eq(settings.studioId, studioId), eq(settings.key, JUDGING_SETTINGS_KEY))).orderBy(asc(settings.fromAt), asc(settings.id))
}

/** Today in a studio's zone needs the zone. */
export async function zoneOf(db: DbOrTx, studioId: string): Promise<string> {
  const [row] = await db.select({ zone: studios.zone }).from(studios).where(eq(studios.id, studioId))
  return row?.zone ?? 'UTC'
}

async function signFacts(db: DbOrTx, studioId: string, personId: string, lessonId: string): Promise<StandingFacts['signs']> {
  const rows = await db.select({
    id: signOffs.id, of: signOffs.of, kind: signOffs.kind, level: signOffs.level, at: signOffs.at, day: signOffs.onDay,
    keeps: sql<string | number | null>`JSON_VALUE(${revisions.compiled}, '$.keeps')`,
  }).from(signOffs)
    .innerJoin(revisions, and(eq(revisions.studioId, signOffs.studioId), eq(revisions.id, signOffs.revisionId)))
    .where(and(eq(signOffs.studioId, studioId), eq(signOffs.personId, personId), eq(signOffs.lessonId, lessonId)))
  if (rows.length === 0) return []
  const numbers = await judgingSettingRows(db, studioId)
  return rows.map(({ keeps, ...row }) => {
    const then = settingsAt(numbers, row.at)
    const days = keeps === null ? then.usualKeeps : Math.round(Number(keeps))
    return { ...row, keeps: row.level === 5 ? Math.max(days, then.teachKeeps) : days }
  })
}

/** Everything on record from which a standing follows. */
export async function standingFacts(db: DbOrTx, studioId: string, personId: string, lessonId: string): Promise<StandingFacts> {
  const zone = await zoneOf(db, studioId)
  const made = await db.select({
    id: pieces.id, status: pieces.status, startedAt: pieces.startedAt, finishedOn: pieces.finishedOn, waitingSince: pieces.waitingSince, turnsDone: pieces.turnsDone, turnsAll: pieces.turnsAll,
  }).from(pieces).where(and(eq(pieces.studioId, studioId), eq(pieces.personId, personId), eq(pieces.lessonId, lessonId)))
  const ofPiece = and(eq(pieces.studioId, judgements.studioId), eq(pieces.id, judgements.pieceId))
  const judged = await db.select({ id: judgements.id, outcome: judgements.outcome, at: judgements.at }).from(judgements).innerJoin(pieces, ofPiece)
    .where(and(eq(judgements.studioId, studioId), eq(judgements.as, 'instructor'), eq(pieces.personId, personId), eq(pieces.lessonId, lessonId)))
  const taught = await db.select({ at: judgements.at }).from(judgements).innerJoin(pieces, ofPiece)
    .where(and(eq(judgements.studioId, studioId), eq(judgements.by, personId), eq(judgements.as, 'instructor'), ne(pieces.personId, personId), eq(pieces.lessonId, lessonId)))
  const [read] = await db.select({ id: revisionReads.revisionId }).from(revisionReads)
    .innerJoin(revisions, and(eq(revisions.studioId, revisionReads.studioId), eq(revisions.id, revisionReads.revisionId)))
    .where(and(eq(revisionReads.studioId, studioId), eq(revisionReads.personId, personId), eq(revisions.lessonId, lessonId)))
    .orderBy(desc(revisions.number)).limit(1)
  return {
    signs: await signFacts(db, studioId, personId, lessonId), pieces: made,
    judged: judged.map(one => ({ ...one, day: dayIn(zone, one.at) })), taught: taught.map(one => dayIn(zone, one.at)), revisionRead: read?.id ?? null,
  }
}

const inLesson = (studioId: string, personId: string, lessonId: string) =>
  and(eq(standings.studioId, studioId), eq(standings.personId, personId), eq(standings.lessonId, lessonId))

/** Writes the standing of one person in one lesson from the facts; to be called in every transaction that changes one of them. */
export async function refreshStanding(tx: Tx, studioId: string, personId: string, lessonId: string): Promise<Standing> {
  const standing = standingOf(await standingFacts(tx, studioId, personId, lessonId))
  if (isBlank(standing)) await tx.delete(standings).where(inLesson(studioId, personId, lessonId))
  else await tx.insert(standings).values({ studioId, personId, lessonId, ...standing }).onDuplicateKeyUpdate({ set: { ...standing } })
  return standing
}

export type StandingRow = typeof standings.$inferSelect

/** The stored standing, or null where nothing is on record. */
export async function readStanding(db: DbOrTx, studioId: string, personId: string, lessonId: string): Promise<StandingRow | null> {
  const [row] = await db.select().from(standings).where(inLesson(studioId, personId, lessonId))
  return row ?? null
}

export interface StandingDifference { personId: string, lessonId: string, stored: Standing | null, worked: Standing }

/** Works every standing of a studio out again; what differs from what is stored. `mend` writes it too. */
export async function rebuildStandings(tx: Tx, studioId: string, mend: boolean): Promise<StandingDifference[]> {
  const differences: StandingDifference[] = []
  for (const { personId, lessonId } of await pairsOf(tx, studioId)) {
    const worked = standingOf(await standingFacts(tx, studioId, personId, lessonId))
    const row = await readStanding(tx, studioId, personId, lessonId)
    const stored = row ? plain(row) : null
    if (stored === null ? isBlank(worked) : !isBlank(worked) && JSON.stringify(stored) === JSON.stringify(plain(worked))) continue
    differences.push({ personId, lessonId, stored, worked })
    if (mend) await refreshStanding(tx, studioId, personId, lessonId)
  }
  return differences
}

/** The members of a standing in one order, so that two can be compared as text. */
function plain(row: Standing): Standing {
  const { levelSigned, oneSignature, signedOn, signOffId, lastPieceOn, aliveOn, keeps, pieces: made, openPiece, placeNo, places, waitingSince, sentBackOn, revisionRead, flags } = row
  return { levelSigned, oneSignature, signedOn, signOffId, lastPieceOn, aliveOn, keeps, pieces: made, openPiece, placeNo, places, waitingSince, sentBackOn, revisionRead, flags }
}

async function pairsOf(db: DbOrTx, studioId: string): Promise<{ personId: string, lessonId: string }[]> {
  const reads = alias(revisions, 'read_revisions')
  const found = [
    ...await db.selectDistinct({ personId: pieces.personId, lessonId: pieces.lessonId }).from(pieces).where(eq(pieces.studioId, studioId)),
    ...await db.selectDistinct({ personId: signOffs.personId, lessonId: signOffs.lessonId }).from(signOffs).where(eq(signOffs.studioId, studioId)),
    ...await db.selectDistinct({ personId: standings.personId, lessonId: standings.lessonId }).from(standings).where(eq(standings.studioId, studioId)),
    ...await db.selectDistinct({ personId: revisionReads.personId, lessonId: reads.lessonId }).from(revisionReads)
      .innerJoin(reads, and(eq(reads.studioId, revisionReads.studioId), eq(reads.id, revisionReads.revisionId))).where(eq(revisionReads.studioId, studioId)),
  ]
  return [...new Map(found.map(pair => [`${pair.personId} ${pair.lessonId}`, pair])).values()]
}
