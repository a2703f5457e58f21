/**
 * The numbers a studio may change. Of the defaults only the six-month life (in the lesson) has a published parent; the
 * counts of pieces and the days between are common practice, with no source.
 */
import { z } from 'zod'
import { PERMISSIONS } from '../lesson/schema'
import { RELATION_KINDS } from '../schemas/lists'

const count = (usual: number, most: number) => z.number().int().min(0).max(most).default(usual)

export const JudgingSettingsSchema = z.strictObject({
  /** Days before a level lapses in which it says "refresh due". */
  refreshDays: count(30, 365),
  /** Days a level 5 lives at least, whatever the lesson says: teaching counts as doing. */
  teachKeeps: count(365, 3650),
  /** Days of a level where the revision it was signed under says none. */
  usualKeeps: count(182, 3650),
  /** Lapsed for longer than this many days, two pieces bring a level back instead of one. */
  longLapsed: count(365, 3650),
  piecesFor3: count(2, 20),
  piecesFor4: count(3, 50),
  piecesFor5: count(10, 100),
  /** Different days the pieces for level 4 are made on, and days from the first to the last. */
  daysFor4: count(2, 20),
  apartFor4: count(7, 365),
  /** Pieces for level 4 that are seen from start to finish. */
  seenWholeFor4: count(1, 10),
  /** This many misses at one hold, and the piece counts for nothing above level 2. */
  missesSpoil: z.number().int().min(1).max(20).default(3),
  /** Level asked of the lessons that come before. */
  neededLevel: z.number().int().min(0).max(4).default(3),
  /** Ties that keep a person from signing. */
  tiesForbid: z.array(z.enum(RELATION_KINDS)).default([...RELATION_KINDS]),
  /** Not open to people under 18: this studio's rule. */
  youngForbid: z.array(z.enum(PERMISSIONS)).default(['flame', 'motors', 'goods']),
})
export type JudgingSettings = z.infer<typeof JudgingSettingsSchema>

export const JUDGING_SETTINGS_KEY = 'judging'
export const USUAL_SETTINGS: JudgingSettings = JudgingSettingsSchema.parse({})

/** The settings as they stood at a moment: the latest row not after it. What cannot be read is the usual. */
export function settingsAt(rows: readonly { fromAt: Date, value: unknown }[], at: Date): JudgingSettings {
  let latest: { fromAt: Date, value: unknown } | null = null
  for (const row of rows) if (row.fromAt <= at && (latest === null || row.fromAt >= latest.fromAt)) latest = row
  const read = JudgingSettingsSchema.safeParse(latest?.value ?? {})
  return read.success ? read.data : USUAL_SETTINGS
}
