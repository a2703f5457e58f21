/** Texts that lie on this device because the studio has not got them yet, and what to begin with when the page opens. */
import { z } from 'zod'

export const SlotSchema = z.object({
  source: z.string(),
  /** The text of the studio it was written on. */
  etag: z.string(),
  at: z.string(),
})
export type Slot = z.infer<typeof SlotSchema>

/** A text that was not taken up, kept on this device till it is brought back or let go. */
export const AsideSchema = z.object({ source: z.string(), at: z.string(), whose: z.string() })
export type Aside = z.infer<typeof AsideSchema>
export const MOST_ASIDE = 10

export interface Begun {
  source: string
  etag: string
  /** `studio`: as the studio has it. `here`: a text of this device goes on where it was left. */
  from: 'studio' | 'here'
  /** Texts of this device written on another text than the studio has now; set aside, not lost. */
  aside: Slot[]
}

/** Begins with the newest text of this device that was written on what the studio has now, else with the studio's own. */
export function beginWith(studio: { source: string, etag: string }, slots: readonly Slot[]): Begun {
  const unsent = slots.filter(slot => slot.source !== studio.source).sort((a, b) => (a.at < b.at ? 1 : -1))
  const [mine] = unsent.filter(slot => slot.etag === studio.etag)
  const aside = unsent.filter(slot => slot !== mine)
  return mine ? { source: mine.source, etag: studio.etag, from: 'here', aside } : { ...studio, from: 'studio', aside }
}

/** The newest first, the same text once, not more than are kept. */
export function withAside(kept: readonly Aside[], more: readonly Aside[]): Aside[] {
  const all = [...more, ...kept].sort((a, b) => (a.at < b.at ? 1 : -1))
  return all.filter((one, index) => all.findIndex(other => other.source === one.source) === index).slice(0, MOST_ASIDE)
}
