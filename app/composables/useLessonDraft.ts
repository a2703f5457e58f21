import type { DraftView } from '#shared/types/lessons'
import { beginWith } from '~/utils/author/keeping'
import { type Conflict, type Trouble, troubleOf } from '~/utils/author/trouble'
import { useDeviceTexts, type DeviceTexts } from './useDeviceTexts'

/** Milliseconds: a text goes to the device at once, to the studio when the hands rest, and again when it was out of reach. */
const REST = 1200
const AGAIN = [4000, 10_000, 30_000]

export interface LessonDraft {
  source: Ref<string>
  /** When the studio last kept the text. */
  keptAt: Ref<string>
  isUnsent: ComputedRef<boolean>
  /** False where this device refuses to keep a copy. */
  isKeptHere: Ref<boolean>
  trouble: Ref<Trouble | null>
  device: DeviceTexts
  etag: Ref<string>
  /** Sends now; true where the studio has the text. */
  send: () => Promise<boolean>
  /** Ends a conflict: mine goes over the other's, or the other's takes mine's place. The one that gives way is set aside. */
  settle: (conflict: Conflict, keep: 'mine' | 'theirs') => void
}

/** A textarea knows one kind of line end; a text that came with another is the same text until a letter is typed. */
const oneLineEnd = (text: string): string => text.replace(/\r\n?/g, '\n')

/** The text of a lesson while it is written: kept here with every letter, sent by itself, lost never. */
export function useLessonDraft(view: DraftView): LessonDraft {
  const device = useDeviceTexts(view.reader, view.lesson.id)
  const studio = { source: oneLineEnd(view.source), etag: view.etag }
  const begun = beginWith(studio, device.read())
  device.setAside(begun.aside.map(({ source, at }) => ({ source, at, whose: 'yours' })))
  device.clearAll()
  const source = ref(begun.source)
  const etag = ref(begun.etag)
  const sent = ref(studio.source)
  const keptAt = ref(view.savedAt)
  const trouble = ref<Trouble | null>(null)
  const isKeptHere = ref(true)
  const isUnsent = computed(() => source.value !== sent.value)
  let flight: Promise<void> | null = null
  let tries = 0
  /** A text that was sent and whose answer never came: the studio may have it. */
  let unheard: string | null = null
  let timer: ReturnType<typeof setTimeout> | undefined

  function plan(wait: number): void {
    clearTimeout(timer)
    timer = setTimeout(() => void send(), wait)
  }

  /** One at a time: a second press waits for the first and sends what is left. */
  async function send(): Promise<boolean> {
    while (flight) await flight
    if (!isUnsent.value) return true
    if (trouble.value?.kind === 'other') return false
    flight = sendOnce(source.value)
    await flight
    return !isUnsent.value
  }

  async function sendOnce(text: string): Promise<void> {
    try {
      const kept = await $fetch<{ etag: string, savedAt: string }>(`/api/lessons/${view.lesson.id}/draft`, { method: 'PUT', body: { etag: etag.value, source: text } })
      etag.value = kept.etag
      sent.value = text
      keptAt.value = kept.savedAt
      trouble.value = null
      tries = 0
      if (isUnsent.value) keepHere()
      else device.clear()
    }
    catch (error) {
      trouble.value = hear(troubleOf(error), text)
    }
    flight = null
    if (isUnsent.value && trouble.value?.kind !== 'other') plan(trouble.value ? AGAIN[Math.min(tries++, AGAIN.length - 1)] ?? REST : REST)
  }

  /** "Another text" that is the one whose answer never came is no other's. */
  function hear(failure: Trouble, text: string): Trouble | null {
    if (failure.kind === 'other' && oneLineEnd(failure.conflict.source) === unheard) {
      etag.value = failure.conflict.etag
      sent.value = unheard
      return null
    }
    if (failure.kind === 'away') unheard = text
    return failure
  }

  function keepHere(): void {
    isKeptHere.value = device.keep({ source: source.value, etag: etag.value, at: new Date().toISOString() })
  }

  function settle(conflict: Conflict, keep: 'mine' | 'theirs'): void {
    const gives = keep === 'mine' ? { source: conflict.source, at: conflict.at, whose: conflict.by } : { source: source.value, at: new Date().toISOString(), whose: 'yours' }
    device.setAside([gives])
    etag.value = conflict.etag
    sent.value = oneLineEnd(conflict.source)
    keptAt.value = conflict.at
    trouble.value = null
    if (keep === 'theirs') source.value = sent.value
    void send()
  }

  watch(source, () => {
    if (!isUnsent.value) return device.clear()
    keepHere()
    if (trouble.value?.kind !== 'other') plan(REST)
  }, { flush: 'sync' })
  useEventListener('online', () => void send())
  useEventListener('focus', () => void (trouble.value && send()))
  // A page that cannot keep its text anywhere asks before it is left.
  useEventListener('beforeunload', (event: BeforeUnloadEvent) => {
    if (isUnsent.value && !isKeptHere.value) event.preventDefault()
  })
  onScopeDispose(() => {
    clearTimeout(timer)
    void send()
  })
  if (isUnsent.value) {
    keepHere()
    plan(REST)
  }

  return { source, keptAt, isUnsent, isKeptHere, trouble, device, etag, send, settle }
}
