/** A judge for the demo: looks at a piece and signs, through the same services as the pages. */
import { ulid } from 'ulid'
import type { Outcome, Seen } from '../../../shared/schemas/lists'
import { againOf, linesOf } from '../../../shared/judging/marks'
import { canMark, type Given } from '../../../shared/judging/given'
import type { SignedLevel } from '../../../shared/judging/levels'
import type { Db } from '../client'
import { inTransaction } from '../transaction'
import type { Actor } from '../../services/actor'
import { judgePiece } from '../../services/judgements'
import { openLedger } from '../../services/ledger'
import { secondName } from '../../services/names-under'
import { found } from '../../services/refuse'
import { signAll } from '../../services/sign-offs'
import { waitingToSign } from '../../services/to-sign'

export interface JudgedPiece { signOff: string, at: Date }
export interface Said { level: number | null, outcome: Extract<Outcome, 'kept' | 'sent-back'>, seen: Seen, words: string, faults: string[] }

/** Judges a piece as its plan says: yes throughout when it is kept, one no when it is sent back. Signs where a level is given. */
export async function judge(db: Db, who: Actor, pieceId: string, said: Said, at: Date): Promise<JudgedPiece | null> {
  const ledger = found(await inTransaction(db, tx => openLedger(tx, who.studioId, pieceId)))
  const set = found(ledger.folded.set)
  const lines = linesOf(set, ledger.folded.state)
  const again = againOf(lines, ledger.row.head)
  const bad = said.outcome === 'sent-back' ? lines.find(line => line.by === 'judge' && line.essential)?.key : undefined
  const marks = Object.fromEntries(lines.flatMap((line): [string, Given][] => {
    if (!canMark(line, said.seen)) return []
    if (line.by === 'judge') return [[line.key, { says: line.key === bad ? 'no' : 'yes' }]]
    return line.key === again && line.takes[0] ? [[line.key, { value: String(Number((line.takes[0].values[0] ?? 0).toFixed(2))) }]] : []
  }))
  const id = ulid(at.getTime())
  await judgePiece(db, who, ulid(at.getTime()), {
    id, piece: pieceId, n: ledger.row.n, head: ledger.row.head, seen: said.seen, outcome: said.outcome, level: levelOf(said.level), marks, faults: said.faults, words: said.words, remake: [], inHand: false,
  }, at)
  if (said.level === null || said.outcome !== 'kept') return null
  const signAt = new Date(at.getTime() + 20 * 60_000)
  const item = found((await waitingToSign(db, who, signAt)).items.find(one => one.judgement === id))
  const signOff = ulid(signAt.getTime())
  const [result] = await signAll(db, who, [{ id: signOff, judgements: item.judgements, level: item.gate.level, n: item.n, head: item.head, words: '' }], signAt)
  if (!result?.ok) throw new Error(`The demo could not be signed: ${result?.says ?? 'nothing came back'}`)
  return { signOff, at: signAt }
}

const levelOf = (level: number | null): SignedLevel | null => level === 1 || level === 2 || level === 3 || level === 4 || level === 5 ? level : null

export async function putSecondName(db: Db, who: Actor, signOff: string, at: Date): Promise<void> {
  await secondName(db, who, signOff, ulid(at.getTime()), at)
}
