import { z } from 'zod'
import { UlidSchema } from '../bench/events'
import { CRAFTS } from '../lesson/schema'
import { EFFECTS } from './lists'

export const SLUG = /^[a-z0-9]+(?:-[a-z0-9]+)*$/
/** Names of pictures are plain, so that one can never be a path. */
export const PICTURE_NAME = /^[a-z0-9][a-z0-9._-]{0,79}$/
export const PICTURE_NAME_SAYS = 'A picture’s name is made of small letters, digits, full stops and hyphens, as bend.jpg.'
/** Letters of a source that are kept at all; the compiler's own limit is far below and says so kindly. */
export const MOST_SOURCE = 1_000_000
export const MOST_PICTURE_BYTES = 32_000_000

/** A lesson is addressed by its slug or by its id. */
export const LessonAddressSchema = z.union([UlidSchema, z.string().max(40).regex(SLUG)])
export const LessonParamsSchema = z.strictObject({ lesson: LessonAddressSchema })
const PictureNameSchema = z.string().regex(PICTURE_NAME, PICTURE_NAME_SAYS)
export const LessonPictureParamsSchema = z.strictObject({ lesson: LessonAddressSchema, name: PictureNameSchema })
export const RevisionPictureParamsSchema = z.strictObject({ revision: UlidSchema, name: PictureNameSchema })
export const PictureQuerySchema = z.strictObject({ name: PictureNameSchema })
export const RevisionQuerySchema = z.strictObject({ number: z.coerce.number().int().min(1).max(100_000).optional() })

/** The id comes from the page, so that a double press makes one lesson. */
export const NewLessonBodySchema = z.strictObject({
  id: UlidSchema,
  title: z.string().trim().min(2, 'Give the lesson a title.').max(120, 'Keep the title to 120 letters.').regex(/[a-z0-9]/i, 'Give the title at least one letter or digit of a to z, 0 to 9.'),
  craft: z.enum(CRAFTS, 'Choose the craft.'),
})
export type NewLessonBody = z.infer<typeof NewLessonBodySchema>

/** `etag` is that of the text it was written on; a source is kept to the byte, so it is not trimmed. */
export const DraftBodySchema = z.strictObject({ etag: UlidSchema, source: z.string().max(MOST_SOURCE, 'This is longer than a lesson can be: 1,000,000 letters.') })
export type DraftBody = z.infer<typeof DraftBodySchema>

export const UseBodySchema = z.strictObject({
  id: UlidSchema, etag: UlidSchema, effect: z.enum(EFFECTS, 'Say what changes for those who hold this lesson.'),
  note: z.string().trim().max(500, 'Keep the note to 500 letters.'),
})
export type UseBody = z.infer<typeof UseBodySchema>

export const WithdrawBodySchema = z.strictObject({ id: UlidSchema, revision: UlidSchema, danger: z.boolean() })
export const BackInUseBodySchema = z.strictObject({ id: UlidSchema, revision: UlidSchema })
export const PutAwayBodySchema = z.strictObject({ away: z.boolean() })
