/** Why a text was not kept by the studio, as the writing page tells it. */
import { z } from 'zod'

export const ConflictSchema = z.object({ by: z.string(), isMine: z.boolean(), at: z.string(), source: z.string(), etag: z.string() })
export type Conflict = z.infer<typeof ConflictSchema>

export type Trouble =
  | { kind: 'who' | 'away' }
  | { kind: 'refused', says: string }
  | { kind: 'other', conflict: Conflict }

const AnswerSchema = z.object({
  statusCode: z.number().optional(),
  data: z.object({ message: z.string().optional(), data: z.unknown().optional() }).optional(),
})
const FieldsSchema = z.object({ fieldErrors: z.record(z.string(), z.array(z.string())) })
const NOT_KEPT = 'The studio did not keep this text. It is kept on this tablet.'

/**
 * Reads the failure of a save. 401: say who you are. 409: another text was kept meanwhile. No answer, 429 or a fault of
 * the server: tried again by itself. Anything else is told in the studio's own sentence.
 */
export function troubleOf(error: unknown): Trouble {
  const answer = AnswerSchema.safeParse(error)
  const status = answer.success ? answer.data.statusCode : undefined
  if (status === 401) return { kind: 'who' }
  const body = answer.success ? answer.data.data : undefined
  const conflict = status === 409 ? ConflictSchema.safeParse(body?.data) : null
  if (conflict?.success) return { kind: 'other', conflict: conflict.data }
  if (status === undefined || status === 429 || status >= 500) return { kind: 'away' }
  const fields = status === 400 ? FieldsSchema.safeParse(body?.data) : null
  return { kind: 'refused', says: (fields?.success && Object.values(fields.data.fieldErrors).flat()[0]) || (body?.message ?? NOT_KEPT) }
}

/** One sentence for a press that did not come through. `keeps` says what became of what was typed. */
export function sayTrouble(error: unknown, keeps: string): string {
  const trouble = troubleOf(error)
  if (trouble.kind === 'refused') return trouble.says
  if (trouble.kind === 'other') return `${trouble.conflict.by} was here before you. Open the page again.`
  return trouble.kind === 'who' ? `Say who you are again. ${keeps}` : `The studio is out of reach. ${keeps}`
}
