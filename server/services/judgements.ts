import { and, eq } from 'drizzle-orm'
import { ulid } from 'ulid'
import type { PieceEvidence } from '../../shared/judging/evidence'
import { evidenceLines, missingMarks, outsideLines, readMeasure, wrongMarks } from '../../shared/judging/given'
import { type Gate, gates } from '../../shared/judging/gates'
import { faultsOf, type Line, linesOf } from '../../shared/judging/marks'
import { signerReasons } from '../../shared/judging/signer'
import type { JudgementBody } from '../../shared/schemas/judging'
import type { Outcome } from '../../shared/schemas/lists'
import type { Db, Tx } from '../db/client'
import { judgements, marks } from '../db/schema/judging'
import { notes } from '../db/schema/pieces'
import { inTransaction, isDuplicate } from '../db/transaction'
import type { Actor } from './actor'
import { bareEvidence } from './evidence'
import { type FactsBefore, gateFacts } from './judging-facts'
import { type Ledger, openLedger } from './ledger'
import { queueMail } from './mail'
import { actOnPiece } from './piece-acts'
import { found, refuse } from './refuse'
import { photosAwaited } from './settle'
import { refreshStanding } from './standings'
import { keepWords } from './words'

export interface Judged { id: string, piece: string, outcome: Outcome, level: number | null, needsSecondName: boolean, isNew: boolean }

interface Judging { tx: Tx, who: Actor, body: JudgementBody, ledger: Ledger, facts: FactsBefore, lines: Line[], now: Date }

/**
 * Judges a piece: marks, words, the piece's own event, its standing, a note and a letter, in one transaction.
 * 403 for one who may not; 409 where more came in than the page showed; 422 with what is missing. The same id again is the same judgement.
 */
export async function judgePiece(db: Db, who: Actor, sessionId: string, body: JudgementBody, now: Date): Promise<Judged> {
  try {
    return await inTransaction(db, tx => judgeIn(tx, who, sessionId, body, now))
  }
  catch (error) {
    if (!isDuplicate(error)) throw error
    return await sameJudgement(db, who, body) ?? refuse(409, 'This piece was judged already. Open it again to see by whom.')
  }
}

async function judgeIn(tx: Tx, who: Actor, sessionId: string, body: JudgementBody, now: Date): Promise<Judged> {
  const ledger = found(await openLedger(tx, who.studioId, body.piece))
  const same = await sameJudgement(tx, who, body)
  if (same) return same
  const facts = await gateFacts(tx, who, ledger.row.personId, ledger.row.lessonId, ledger.lesson, now)
  const [reason] = signerReasons(facts)
  if (reason) refuse(403, reason.says, { reasons: signerReasons(facts) })
  const { set, state } = ledger.folded
  if (!set) refuse(404, 'This piece has not begun.')
  const judging: Judging = { tx, who, body, ledger, facts, lines: linesOf(set, state), now }
  await asShown(judging)
  checkMarks(judging)
  const evidence: PieceEvidence = { ...bareEvidence(ledger.row, set, state), outcome: body.outcome, seen: body.seen, lines: evidenceLines(judging.lines, body.marks) }
  const gate = checkLevel(judging, evidence)
  await writeJudgement(judging, evidence)
  await actOnPiece(tx, who, { pieceId: body.piece, tablet: sessionId, id: ulid(now.getTime()), kind: 'piece.judged', body: { judgement: body.id, outcome: body.outcome, remake: body.outcome === 'mend' ? body.remake : [] } }, now)
  await refreshStanding(tx, who.studioId, who.personId, ledger.row.lessonId)
  await tellMaker(judging)
  return { id: body.id, piece: body.piece, outcome: body.outcome, level: body.level, needsSecondName: gate?.needsSecondName ?? false, isNew: true }
}

/** The judgement of this id, when it was made before by the same person on the same piece. */
async function sameJudgement(db: Db | Tx, who: Actor, body: JudgementBody): Promise<Judged | null> {
  const [row] = await db.select().from(judgements).where(and(eq(judgements.studioId, who.studioId), eq(judgements.id, body.id)))
  if (!row) return null
  if (row.pieceId !== body.piece || row.by !== who.personId) refuse(409, 'This was judged before, as another piece. Open the page again.')
  return { id: row.id, piece: row.pieceId, outcome: row.outcome, level: row.level, needsSecondName: (row.level ?? 0) >= 4, isNew: false }
}

/** What the judge was shown is what there is: nothing came in since, and the photos are here or the piece is in the hand. */
async function asShown({ tx, who, body, ledger }: Judging): Promise<void> {
  const { row } = ledger
  if (row.status === 'judged') refuse(409, 'This piece was judged already. Open it again to see by whom.')
  if (row.status !== 'finished') refuse(409, 'This piece is not finished. It is at the bench.')
  if (row.n !== body.n || row.head !== body.head) {
    const more = row.n - body.n
    refuse(409, more > 0 ? `${more} more ${more === 1 ? 'thing' : 'things'} came in. Look again.` : 'What is here is not what you were shown. Look again.', { n: row.n, head: row.head })
  }
  const awaited = await photosAwaited(tx, who.studioId, [row.id])
  if (awaited > 0 && !body.inHand) refuse(409, `${awaited} ${awaited === 1 ? 'photo is' : 'photos are'} still on the tablet. Wait for ${awaited === 1 ? 'it' : 'them'}, or say that you have the piece in the hand.`, { awaited })
}

function checkMarks({ body, ledger, lines }: Judging): void {
  const wrong = wrongMarks(lines, body.marks, body.seen)
  if (wrong.length > 0) refuse(422, wrong[0]?.says ?? '', { marks: wrong })
  const missing = missingMarks(lines, body.marks, body.seen, body.outcome, ledger.row.head)
  if (missing.length > 0) refuse(422, missing[0]?.says ?? '', { marks: missing })
  const known = new Set(faultsOf(ledger.lesson).map(fault => fault.key))
  if (body.faults.some(key => !known.has(key))) refuse(422, 'The lesson names no such fault.')
  if (body.outcome !== 'kept' && body.words === '') refuse(422, body.outcome === 'mend' ? 'Say what is to be mended.' : 'Say why it is sent back.', { fieldErrors: { words: ['Say why.'] } })
  if (body.outcome === 'mend' && body.remake.length === 0) refuse(422, 'Say from which step it is made again.', { fieldErrors: { remake: ['Choose a step.'] } })
}

function checkLevel({ body, facts }: Judging, evidence: PieceEvidence): Gate | null {
  if (body.level === null) return null
  const gate = gates({ ...facts, piece: evidence }).find(one => one.level === body.level)
  if (!gate || !gate.may) refuse(422, gate?.reasons[0]?.says ?? 'There is no such level.', { reasons: gate?.reasons ?? [] })
  if (body.level >= 4 && outsideLines(evidence.lines, body.level).length > 0 && body.words === '') refuse(422, 'A line is no, or outside. Say a word why it may be so.', { fieldErrors: { words: ['Say why.'] } })
  return gate
}

async function writeJudgement({ tx, who, body, ledger, facts, lines, now }: Judging, evidence: PieceEvidence): Promise<void> {
  const words = body.words === '' ? null : await keepWords(tx, who, body.words, now)
  const { studioId } = who
  await tx.insert(judgements).values({
    studioId, id: body.id, pieceId: body.piece, by: who.personId, as: 'instructor', seen: body.seen, n: body.n, head: body.head, outcome: body.outcome, level: body.level, scales: null,
    faults: body.faults, inHand: body.inHand, wordsId: words?.id ?? null, signerLevel: facts.signer.held.levelSigned, at: now,
  })
  // Measures are held to the tolerance of the level given; where the level stays, to that of the level the piece began with.
  const level = body.level ?? ledger.folded.state.start?.level ?? 0
  const rows = lines.flatMap((line) => {
    const given = body.marks[line.key]
    const within = line.by === 'judge' ? null : evidence.lines.find(one => one.key === line.key)?.inside[level] ?? null
    if (!given && within === null) return []
    const value = given?.value === undefined ? null : readMeasure(given.value)?.toString() ?? null
    return [{ studioId, judgementId: body.id, criterion: line.key, says: given?.says ?? null, value, unit: line.reading?.unit ?? null, within, essential: line.essential, rest: given?.rest ?? false, photoId: null }]
  })
  if (rows.length > 0) await tx.insert(marks).values(rows)
}

const BECAME: Record<Outcome, string> = { 'kept': 'was looked at and kept', 'sent-back': 'was looked at and sent back', 'mend': 'was looked at and comes back to your bench to be mended' }

/** A note that waits until the next piece is down, and a letter. */
async function tellMaker({ tx, who, body, ledger, now }: Judging): Promise<void> {
  const { row, lesson } = ledger
  const said = await keepWords(tx, who, body.words === '' ? `${row.label} ${BECAME[body.outcome]}.` : `${row.label} ${BECAME[body.outcome]}. ${body.words}`, now)
  await tx.insert(notes).values({ studioId: who.studioId, id: ulid(now.getTime()), personId: row.personId, pieceId: row.id, wordsId: said.id, danger: false, at: now })
  await queueMail(tx, {
    studioId: who.studioId, toPerson: row.personId, kind: 'judged', body: { lesson: lesson.title, piece: row.label, outcome: body.outcome, by: who.personId, words: said.id }, dedupeKey: `judged ${body.id}`,
  }, now)
}
