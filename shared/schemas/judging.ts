import { z } from 'zod'
import { AddressSchema, ShaSchema, UlidSchema } from '../bench/events'
import { SIGNED_LEVELS } from '../judging/levels'
import { PERMISSIONS } from '../lesson/schema'
import { OUTCOMES, PERMISSION_ACTS, SAYS, SEEN } from './lists'

export const SignOffParamsSchema = z.strictObject({ signOff: UlidSchema })

const KeySchema = z.string().regex(/^[a-z0-9-]{1,40}$/)
const WordsSchema = z.string().trim().max(1800, 'At most 1800 letters.')
export const GivenSchema = z.strictObject({ says: z.enum(SAYS).optional(), value: z.string().trim().max(12).optional(), rest: z.literal(true).optional() })
const LevelSchema = z.union(SIGNED_LEVELS.map(level => z.literal(level)))

/** One look at one piece. The id is made when the page opens; `n` and `head` are what the page was shown. */
export const JudgementBodySchema = z.strictObject({
  id: UlidSchema, piece: UlidSchema, n: z.number().int().min(1), head: ShaSchema,
  seen: z.enum(SEEN, { error: 'Say how much of the making you saw.' }), outcome: z.enum(OUTCOMES, { error: 'Say what becomes of the piece.' }),
  /** Null: the level stays as it is. */
  level: LevelSchema.nullable(),
  marks: z.record(KeySchema, GivenSchema), faults: z.array(KeySchema).max(20), words: WordsSchema.default(''),
  /** Turns to make again, when it is to be mended. */
  remake: z.array(AddressSchema).max(200).default([]),
  /** Photos are still on a tablet, and the judge has the piece in the hand. */
  inHand: z.boolean().default(false),
})
export type JudgementBody = z.output<typeof JudgementBodySchema>

export const SignItemSchema = z.strictObject({
  /** Id of the sign-off, made when the page opened. */
  id: UlidSchema,
  /** The judgement that gave the level first, then those it rests on. */
  judgements: z.array(UlidSchema).min(1).max(60), level: LevelSchema,
  /** What stood on the page of the piece signed for. */
  n: z.number().int().min(1), head: ShaSchema, words: WordsSchema.default(''),
})
export type SignItem = z.output<typeof SignItemSchema>
const PasswordSchema = z.string().min(1, 'Say your password.').max(200)
export const SignBodySchema = z.strictObject({ password: PasswordSchema, items: z.array(SignItemSchema).min(1, 'There is nothing to sign.').max(40) })
export const SecondNameBodySchema = z.strictObject({ id: UlidSchema, password: PasswordSchema })
export const FoundingBodySchema = z.strictObject({ id: UlidSchema, person: UlidSchema, lesson: UlidSchema, level: z.union([z.literal(4), z.literal(5)]).default(5), password: PasswordSchema })

export const PersonParamsSchema = z.strictObject({ person: UlidSchema })
/** An act on a permission: the reason is asked for all but giving it. */
export const PermissionBodySchema = z.strictObject({
  id: UlidSchema, permission: z.enum(PERMISSIONS), act: z.enum(PERMISSION_ACTS), words: WordsSchema.default(''),
  /** What it is limited to, in a few words: "practice material only". */
  limit: z.string().trim().max(60).default(''),
})
export type PermissionBody = z.output<typeof PermissionBodySchema>
