/** Sends what is kept to the studio, in order, and takes in what others did. It is given its way to the studio, so that it runs in tests. */
import type { StoredEvent } from '#shared/bench/events'
import type { BenchDb, KeptEvent } from './db'

export interface Answer { status: number, data: unknown }
/** Every call answers, whatever its status; it throws only when the studio cannot be reached. */
export interface ToStudio {
  post: (address: string, body: unknown) => Promise<Answer>
  put: (address: string, body: Blob) => Promise<Answer>
  get: (address: string) => Promise<Answer>
}
/** sent: all is there. who: the person must say who they are. away: the studio is out of reach or out of order. */
export type Outcome = 'sent' | 'who' | 'away'

const MOST = 100
interface TakenIn { n: number, taken: { id: string, n: number, late: boolean }[], already: { id: string, n: number }[], refused: { id: string, reason: string, says: string, expected?: number } | null }
const isTakenIn = (data: unknown): data is TakenIn => typeof data === 'object' && data !== null && 'taken' in data && Array.isArray(data.taken)

const waiting = (kept: readonly KeptEvent[], tablet: string): KeptEvent[] =>
  kept.filter(one => one.n === null && one.aside === null && one.tablet === tablet).sort((a, b) => a.seq - b.seq)

/** Sends everything of this person on this tablet: events piece by piece, then photos whose event is there. */
export async function sendAll(db: BenchDb, to: ToStudio, tablet: string, person: string, clock: () => string): Promise<Outcome> {
  const own = await db.getAllFromIndex('events', 'actor', person)
  const first = new Map<string, string>()
  for (const one of waiting(own, tablet)) if ((first.get(one.piece) ?? '~') > one.id) first.set(one.piece, one.id)
  const pieces = [...first].sort((a, b) => a[1] < b[1] ? -1 : 1).map(([piece]) => piece)
  for (const piece of pieces) {
    const outcome = await sendPiece(db, to, tablet, piece, clock)
    if (outcome !== 'sent') return outcome
  }
  return await sendPhotos(db, to, person)
}

async function sendPiece(db: BenchDb, to: ToStudio, tablet: string, piece: string, clock: () => string): Promise<Outcome> {
  for (;;) {
    const batch = waiting(await db.getAllFromIndex('events', 'piece', piece), tablet).slice(0, MOST)
    if (batch.length === 0) return 'sent'
    const answer = await to.post(`/api/pieces/${piece}/events`, { tablet, sentAt: clock(), events: batch.map(one => one.event) }).catch(() => null)
    if (!answer || answer.status >= 500 || answer.status === 429) return 'away'
    if (answer.status === 401) return 'who'
    if (!isTakenIn(answer.data)) {
      // Nothing of this batch can ever be taken as it stands; it is kept here, told of, and blocks nothing.
      await setAside(db, batch, `refused-${answer.status}`, saysOf(answer))
      continue
    }
    await take(db, answer.data, batch)
    // What came late was decided by another tablet or an instructor: hear it now.
    if (answer.data.taken.some(one => one.late)) await pull(db, to, piece)
  }
}

const saysOf = ({ data }: Answer): string => typeof data === 'object' && data !== null && 'message' in data && typeof data.message === 'string' ? data.message : 'The studio does not take this.'

async function setAside(db: BenchDb, batch: readonly KeptEvent[], reason: string, says: string): Promise<void> {
  const tx = db.transaction('events', 'readwrite')
  for (const one of batch) await tx.store.put({ ...one, aside: { reason, says } })
  await tx.done
}

async function take(db: BenchDb, { taken, already, refused }: TakenIn, batch: readonly KeptEvent[]): Promise<void> {
  const tx = db.transaction('events', 'readwrite')
  for (const { id, n, late } of [...taken, ...already.map(one => ({ ...one, late: null }))]) {
    const known = await tx.store.get(id)
    if (known) await tx.store.put({ ...known, n, late: late ?? known.late })
  }
  if (refused) {
    const { expected } = refused
    const known = await tx.store.get(refused.id)
    const again = refused.reason === 'seq' && expected !== undefined && known ? await earlier(tx.store.index('piece').getAll(known.piece), known, expected) : []
    // The studio has lost acts it once had (a copy was put back): they are sent again.
    for (const one of again) await tx.store.put({ ...one, n: null })
    if (known && again.length === 0) await tx.store.put({ ...known, aside: { reason: refused.reason, says: refused.says } })
  }
  await tx.done
  if (!refused && taken.length + already.length === 0) await setAside(db, batch, 'unanswered', 'The studio did not say what became of this.')
}

async function earlier(kept: Promise<KeptEvent[]>, at: KeptEvent, expected: number): Promise<KeptEvent[]> {
  return (await kept).filter(one => one.tablet === at.tablet && one.seq >= expected && one.seq < at.seq && one.n !== null)
}

async function sendPhotos(db: BenchDb, to: ToStudio, person: string): Promise<Outcome> {
  for (const photo of await db.getAllFromIndex('photos', 'person', person)) {
    if (photo.sent !== 'no') continue
    const told = (await db.getAllFromIndex('events', 'piece', photo.piece)).find(one => one.event.kind === 'photo.taken' && one.event.body.photo === photo.id)
    if (told && told.n === null && told.aside === null) continue
    const answer = await to.put(`/api/photos/${photo.id}`, photo.blob).catch(() => null)
    if (!answer || answer.status >= 500 || answer.status === 429) return 'away'
    if (answer.status === 401) return 'who'
    await db.put('photos', { ...photo, sent: answer.status < 300 ? 'yes' : 'aside', says: answer.status < 300 ? '' : saysOf(answer) })
  }
  return 'sent'
}

const isEvents = (data: unknown): data is { events: StoredEvent[], n: number } => typeof data === 'object' && data !== null && 'events' in data && Array.isArray(data.events)

/** Takes in what others (an instructor, another tablet) added to a piece. */
export async function pull(db: BenchDb, to: ToStudio, pieceId: string): Promise<Outcome> {
  const piece = await db.get('pieces', pieceId)
  if (!piece) return 'sent'
  // Not known there yet: its first act has not been sent.
  if (piece.pulled === 0 && !(await db.getAllFromIndex('events', 'piece', pieceId)).some(one => one.n !== null)) return 'sent'
  const answer = await to.get(`/api/pieces/${pieceId}/events?after=${piece.pulled}`).catch(() => null)
  if (!answer || answer.status >= 500 || answer.status === 429) return 'away'
  if (answer.status === 401) return 'who'
  if (!isEvents(answer.data)) return 'sent'
  await takeIn(db, pieceId, answer.data.events)
  return 'sent'
}

/** Keeps events numbered by the studio. */
export async function takeIn(db: BenchDb, pieceId: string, events: readonly StoredEvent[]): Promise<void> {
  if (events.length === 0) return
  const tx = db.transaction(['pieces', 'events'], 'readwrite')
  for (const { n, late, ...event } of events) {
    await tx.objectStore('events').put({ id: event.id, piece: pieceId, tablet: event.tablet, seq: event.seq, actor: event.actor, event, n, late, aside: null })
  }
  const piece = await tx.objectStore('pieces').get(pieceId)
  if (piece) await tx.objectStore('pieces').put({ ...piece, pulled: Math.max(piece.pulled, ...events.map(event => event.n)) })
  await tx.done
}
