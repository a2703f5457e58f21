import { z } from 'zod'
import { UlidSchema } from '../bench/events'

/** A lesson goes by its slug or its id. */
export const BenchLessonParamsSchema = z.strictObject({ lesson: z.string().regex(/^([a-z0-9-]{1,40}|[0-7][0-9A-HJKMNP-TV-Z]{25})$/) })
export const NoteParamsSchema = z.strictObject({ note: UlidSchema })
