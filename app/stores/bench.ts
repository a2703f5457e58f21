import { ulid } from 'ulid'
import type { AnyEvent, Bodies, MakerKind } from '#shared/bench/events'
import { type Folded, fold } from '#shared/bench/machine'
import type { BenchLesson, PieceTakenUp } from '#shared/types/bench'
import { append, asEvents } from '~/utils/bench/append'
import { benchDb, type KeptPhoto, type KeptPiece } from '~/utils/bench/db'
import { takeIn } from '~/utils/bench/send'

/** The piece in hand: what is kept of it here, folded by the machine of the bench. */
export const useBenchStore = defineStore('bench', () => {
  const outbox = useOutboxStore()
  const piece = shallowRef<KeptPiece | null>(null)
  const events = shallowRef<AnyEvent[]>([])
  const folded = shallowRef<Folded | null>(null)
  /** What was said no to last, as a sentence; gone with the next act that is taken. */
  const says = ref('')
  let last: number | null = null
  let isBusy = false

  /** Takes a piece up: what is kept here, and what the studio has of it. False where neither knows it. */
  async function open(id: string): Promise<'open' | 'none' | 'who' | 'away'> {
    const db = await benchDb()
    const kept = await db.get('pieces', id)
    last = null
    says.value = ''
    if (kept && kept.person === outbox.person) {
      piece.value = kept
      await refresh()
      void outbox.look(id)
      return 'open'
    }
    const answer = await $fetch.raw<PieceTakenUp>(`/api/pieces/${id}`, { ignoreResponseError: true }).catch(() => null)
    if (!answer || answer.status >= 500) return 'away'
    if (answer.status === 401) return 'who'
    const taken = answer._data
    if (answer.status !== 200 || !taken || taken.piece.personId !== outbox.person) return 'none'
    piece.value = { id, person: outbox.person, revision: taken.revision, compiled: taken.compiled, label: taken.piece.label, pulled: 0 }
    await db.put('pieces', piece.value)
    await takeIn(db, id, taken.events)
    await refresh()
    return 'open'
  }

  async function refresh(): Promise<void> {
    if (!piece.value) return
    const { id, compiled } = piece.value
    const kept = await (await benchDb()).getAllFromIndex('events', 'piece', id)
    if (piece.value.id !== id) return
    events.value = asEvents(kept)
    folded.value = fold(compiled, id, events.value)
  }

  /** Begins a piece of a lesson; gives its id, or null with the sentence in `says`. */
  async function begin(lesson: BenchLesson, start: Bodies['piece.started'], id: string): Promise<string | null> {
    const kept: KeptPiece = { id, person: outbox.person, revision: lesson.revision, compiled: lesson.compiled, label: '', pulled: 0 }
    piece.value = kept
    folded.value = null
    last = null
    return await act('piece.started', start, undefined, id) ? kept.id : null
  }

  /** Does one act. False where it may not be, with the sentence in `says`. One at a time: a double press is dropped. */
  async function act<K extends MakerKind>(kind: K, body: Bodies[K], photo?: KeptPhoto, id = ulid()): Promise<boolean> {
    if (!piece.value || isBusy) return false
    isBusy = true
    try {
      const now = performance.now()
      const by = { tablet: outbox.tablet, actor: outbox.person, at: new Date().toISOString(), since: last === null ? null : Math.round(now - last) }
      const appended = await append(await benchDb(), piece.value, { id, kind, body }, by, photo)
      says.value = appended.ok ? '' : appended.says
      if (!appended.ok) { await refresh(); return false }
      last = now
      await refresh()
      void outbox.changed()
      return true
    }
    catch {
      says.value = 'This tablet could not keep that. Nothing you did before is lost; try again.'
      return false
    }
    finally { isBusy = false }
  }

  /** Asks the studio for the label of a piece that it has numbered meanwhile. */
  async function hearLabel(): Promise<void> {
    const kept = piece.value
    if (!kept || kept.label !== '' || !events.value.some(event => event.n !== undefined)) return
    const answer = await $fetch<PieceTakenUp>(`/api/pieces/${kept.id}`).catch(() => null)
    if (!answer || piece.value?.id !== kept.id) return
    const db = await benchDb()
    const now = await db.get('pieces', kept.id)
    if (!now) return
    piece.value = { ...now, label: answer.piece.label }
    await db.put('pieces', piece.value)
  }

  watch(() => outbox.changes, async () => { await refresh(); await hearLabel() })
  return { piece, events, folded, says, open, refresh, begin, act }
})
