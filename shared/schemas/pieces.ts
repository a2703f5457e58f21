import { z } from 'zod'
import { AddressSchema, UlidSchema, WITNESS_HOW } from '../bench/events'

export const PieceParamsSchema = z.strictObject({ piece: UlidSchema })
export const PhotoParamsSchema = z.strictObject({ photo: UlidSchema })
export const EventsQuerySchema = z.strictObject({ after: z.coerce.number().int().min(0).max(1_000_000).default(0) })

const WordsSchema = z.string().trim().max(500, 'At most 500 letters.')
/** Ids are made when the page opens, so that a double press is the same act. */
export const WitnessBodySchema = z.strictObject({ id: UlidSchema, turn: AddressSchema, how: z.enum(WITNESS_HOW) })
export const ReleaseBodySchema = z.strictObject({ id: UlidSchema, turn: AddressSchema, says: WordsSchema.min(3, 'Say why this question is let go.') })
export const LookBodySchema = z.strictObject({ id: UlidSchema, says: WordsSchema.optional(), danger: z.boolean().default(false) })
