import { ulid } from 'ulid'
import { benchDb, tabletId } from '~/utils/bench/db'
import { type Answer, pull, sendAll, type ToStudio } from '~/utils/bench/send'

/** Milliseconds: how soon it is tried again, and how often it is looked whether something waits. */
const AGAIN = [2000, 5000, 15_000, 30_000]
const LOOK_EVERY = 20_000
const CHANNEL = 'thirdhand-bench'
const LOCK = 'thirdhand-send'

export interface Aside { id: string, says: string }

const answer = async (address: string, options: { method: 'GET' | 'POST' | 'PUT', body?: Blob | Record<string, unknown>, headers?: Record<string, string> }): Promise<Answer> => {
  const response = await $fetch.raw<unknown>(address, { ...options, ignoreResponseError: true, retry: 0 })
  return { status: response.status, data: response._data }
}
export const TO_STUDIO: ToStudio = {
  post: (address, body) => answer(address, { method: 'POST', body: body as Record<string, unknown> }),
  put: (address, body) => answer(address, { method: 'PUT', body, headers: { 'content-type': 'application/octet-stream' } }),
  get: address => answer(address, { method: 'GET' }),
}

/** What is kept on this tablet and not yet at the studio. One sender for all pages of the tablet. */
export const useOutboxStore = defineStore('outbox', () => {
  const person = ref('')
  const tablet = ref('')
  const waiting = ref(0)
  const asides = ref<Aside[]>([])
  const reach = ref<'in' | 'who' | 'away'>('in')
  /** Goes up when what is kept here has changed, by this page or another. */
  const changes = ref(0)
  let channel: BroadcastChannel | null = null
  let timer: ReturnType<typeof setTimeout> | undefined
  let tries = 0
  let isSending = false
  let isAskedAgain = false

  /** Takes up sending for a person; safe to call again. */
  async function start(id: string): Promise<void> {
    person.value = id
    const db = await benchDb()
    tablet.value = await tabletId(db, ulid)
    if (!channel) {
      channel = new BroadcastChannel(CHANNEL)
      channel.onmessage = () => { changes.value++; void count() }
      useEventListener(window, 'online', () => void kick())
      useEventListener(document, 'visibilitychange', () => { if (document.visibilityState === 'visible') void kick() })
      useIntervalFn(() => { if (waiting.value > 0) void kick() }, LOOK_EVERY)
    }
    await count()
    void kick()
  }

  async function count(): Promise<void> {
    const db = await benchDb()
    const events = await db.getAllFromIndex('events', 'actor', person.value)
    const photos = await db.getAllFromIndex('photos', 'person', person.value)
    waiting.value = events.filter(one => one.n === null && !one.aside).length + photos.filter(one => one.sent === 'no').length
    asides.value = [...events.flatMap(one => one.aside ? [{ id: one.id, says: one.aside.says }] : []), ...photos.flatMap(one => one.sent === 'aside' ? [{ id: one.id, says: one.says }] : [])]
  }

  /** Something was kept: tells the other pages and sends. */
  async function changed(): Promise<void> {
    changes.value++
    channel?.postMessage('changed')
    await count()
    void kick()
  }

  /** Sends now, unless another page of the tablet is sending; then that one does. */
  async function kick(): Promise<void> {
    if (isSending) { isAskedAgain = true; return }
    if (!person.value || !tablet.value) return
    isSending = true
    clearTimeout(timer)
    await navigator.locks.request(LOCK, async () => {
      const before = waiting.value
      const outcome = await sendAll(await benchDb(), TO_STUDIO, tablet.value, person.value, () => new Date().toISOString()).catch(() => 'away' as const)
      reach.value = outcome === 'sent' ? 'in' : outcome
      await count()
      if (before !== waiting.value) { changes.value++; channel?.postMessage('changed') }
    }).finally(() => { isSending = false })
    if (reach.value === 'in') tries = 0
    if (isAskedAgain && reach.value === 'in') { isAskedAgain = false; await kick(); return }
    isAskedAgain = false
    if (reach.value !== 'in' && waiting.value > 0) timer = setTimeout(() => void kick(), AGAIN[Math.min(tries++, AGAIN.length - 1)])
  }

  /** Looks whether others did something to a piece. */
  async function look(piece: string): Promise<void> {
    const outcome = await pull(await benchDb(), TO_STUDIO, piece).catch(() => 'away' as const)
    if (outcome === 'sent') { changes.value++; channel?.postMessage('changed') }
    else reach.value = outcome
  }

  const says = computed(() => {
    const left = waiting.value === 0 ? 'Kept here and sent' : `Kept here, ${waiting.value} to send`
    return reach.value === 'who' ? `${left}. Say who you are again` : reach.value === 'away' ? `${left}. The studio is out of reach` : left
  })

  return { person, tablet, waiting, asides, reach, changes, says, start, changed, kick, look }
})
