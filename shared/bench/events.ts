/**
 * The closed list of bench events: what is said by a tablet or an instructor about one piece. Bodies carry what a person
 * did and never a verdict; free text never stands in one (`words` is the id of a text kept apart, which can be erased).
 */
import { z } from 'zod'
import { canonical, sha256 } from '../lesson/canonical'
import { OUTCOMES, PHOTO_FOR, SAYS } from '../schemas/lists'

export const EVENT_VERSION = 1
export const MAKER_KINDS = ['piece.started', 'sitting.opened', 'step.done', 'hold.answered', 'check.answered', 'reading.taken', 'photo.taken', 'wait.started',
  'fault.seen', 'turn.remade', 'look.asked', 'look.let-go', 'closing.cleared', 'own.marked', 'piece.finished', 'piece.put-away'] as const
export const INSTRUCTOR_KINDS = ['hold.witnessed', 'hold.released', 'look.given', 'stop.called', 'stop.lifted', 'piece.judged', 'event.corrected'] as const
export const EVENT_KINDS = [...MAKER_KINDS, ...INSTRUCTOR_KINDS] as const
export type MakerKind = (typeof MAKER_KINDS)[number]
export type InstructorKind = (typeof INSTRUCTOR_KINDS)[number]
export type EventKind = (typeof EVENT_KINDS)[number]

export const SITTING_ALIKE = ['yes', 'no', 'first'] as const
export const WAYS = ['watch', 'steps', 'tell', 'do'] as const
export const LOOK_ABOUT = ['stuck', 'check', 'hold'] as const
export const PUT_AWAY_WHY = ['broken', 'lost', 'stopped', 'wrong-sizes'] as const
export const WITNESS_HOW = ['there', 'photo'] as const
export const STOP_WHY = ['lesson-withdrawn', 'danger', 'class'] as const
export const CORRECTIONS = ['wrong-person', 'wrong-piece', 'wrong-value', 'made-by-mistake'] as const

export const UlidSchema = z.string().regex(/^[0-7][0-9A-HJKMNP-TV-Z]{25}$/)
export const ShaSchema = z.string().regex(/^[0-9a-f]{64}$/)
/** `key`, `key@3` (third turn of its part), `key@3.2` (second turn of the step in that one). */
export const AddressSchema = z.string().regex(/^[a-z0-9-]{1,40}(@[1-9]\d{0,3}(\.[1-9]\d{0,3})?)?$/)
const KeySchema = z.string().regex(/^[a-z0-9-]{1,40}$/)
const NameSchema = z.string().regex(/^[a-z][a-z0-9_]{0,30}$/)
/** A number in its base unit (mm, g, s, N, deg), as text, so that no reader rounds it. */
export const DecimalSchema = z.string().regex(/^-?\d{1,12}(\.\d{1,15})?$/)
const TypedSchema = z.string().max(40)
const AtSchema = z.string().regex(/^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d\.\d{3}Z$/)
const index = z.number().int().min(0).max(99)

/** A size as told: its value in the base unit (decimal text; `yes`/`no`; the words of a choice or metal), and as typed. */
const ToldSchema = z.strictObject({ value: z.string().min(1).max(80), typed: TypedSchema })
export type Told = z.infer<typeof ToldSchema>

export const PieceStartedSchema = z.strictObject({
  lesson: UlidSchema, revision: UlidSchema,
  /** Sha of the compiled value the tablet runs on. */
  compiled: ShaSchema,
  engine: z.number().int(),
  sizes: z.record(NameSchema, ToldSchema), figures: z.record(NameSchema, z.string().min(1).max(80)),
  plan: ShaSchema, material: z.string().max(60), practice: z.boolean(), goods: UlidSchema.nullable(), left: z.boolean(),
  /** As known on the tablet; decides which holds need a witness. */
  level: z.number().int().min(0).max(5),
  /** Holds of `once: stick` or `session` passed before, by step key, and readings kept with the stick. */
  once: z.strictObject({ passed: z.array(KeySchema).max(200), samples: z.record(NameSchema, DecimalSchema) }),
})
export type PieceStarted = z.infer<typeof PieceStartedSchema>

export const MeasuredSchema = z.strictObject({ values: z.array(DecimalSchema).min(1).max(12), typed: z.array(TypedSchema).max(12), unit: z.string().max(8), gauge: z.string().max(60) })
export const AnswerSchema = z.union([
  z.strictObject({ choice: KeySchema }),
  z.strictObject({ count: DecimalSchema, typed: TypedSchema }),
  MeasuredSchema,
  z.strictObject({ photo: UlidSchema }),
])
export type Answer = z.infer<typeof AnswerSchema>

const turn = { turn: AddressSchema }
/** The body of each kind. */
export const BODIES = {
  'piece.started': PieceStartedSchema,
  'sitting.opened': z.strictObject({ place: AddressSchema.nullable(), alike: z.enum(SITTING_ALIKE), way: z.enum(WAYS), version: z.string().max(40) }),
  'step.done': z.strictObject({ ...turn, early: z.boolean() }),
  'hold.answered': z.strictObject({ ...turn, ask: index, answer: AnswerSchema }),
  'check.answered': z.strictObject({ ...turn, check: index, choice: KeySchema }),
  'reading.taken': z.strictObject({ turn: AddressSchema.nullable(), reading: NameSchema, ...MeasuredSchema.shape }),
  'photo.taken': z.strictObject({ photo: UlidSchema, turn: AddressSchema.nullable(), for: z.enum(PHOTO_FOR), sha256: ShaSchema, bytes: z.number().int().min(1).max(20_000_000),
    type: z.enum(['image/jpeg', 'image/webp', 'image/png']), width: z.number().int().min(1).max(10_000), height: z.number().int().min(1).max(10_000) }),
  'wait.started': z.strictObject({ ...turn, wait: index, until: AtSchema }),
  'fault.seen': z.strictObject({ turn: AddressSchema.nullable(), fault: KeySchema }),
  'turn.remade': z.strictObject({ ...turn, why: z.string().max(40) }),
  'look.asked': z.strictObject({ turn: AddressSchema.nullable(), about: z.enum(LOOK_ABOUT) }),
  'look.let-go': z.strictObject({ turn: AddressSchema.nullable() }),
  'closing.cleared': z.strictObject({ item: KeySchema }),
  'own.marked': z.strictObject({ criterion: KeySchema, says: z.enum(SAYS) }),
  'piece.finished': z.strictObject({}),
  'piece.put-away': z.strictObject({ why: z.enum(PUT_AWAY_WHY), words: UlidSchema.nullable() }),
  'hold.witnessed': z.strictObject({ ...turn, how: z.enum(WITNESS_HOW) }),
  'hold.released': z.strictObject({ ...turn, words: UlidSchema }),
  'look.given': z.strictObject({ words: UlidSchema.nullable() }),
  'stop.called': z.strictObject({ why: z.enum(STOP_WHY), words: UlidSchema.nullable() }),
  'stop.lifted': z.strictObject({ words: UlidSchema.nullable() }),
  'piece.judged': z.strictObject({ judgement: UlidSchema, outcome: z.enum(OUTCOMES), remake: z.array(AddressSchema).max(200) }),
  'event.corrected': z.strictObject({ of: UlidSchema, says: z.enum(CORRECTIONS), words: UlidSchema }),
} as const satisfies Record<EventKind, z.ZodType>
export type Bodies = { [K in EventKind]: z.infer<(typeof BODIES)[K]> }

/** What every event carries around its body. Strict: an unknown member is refused. */
export const EnvelopeSchema = z.strictObject({
  id: UlidSchema, piece: UlidSchema, round: UlidSchema, tablet: UlidSchema,
  /** 1, 2, 3 ... without a gap for each piece and tablet. */
  seq: z.number().int().min(1).max(1_000_000),
  actor: UlidSchema, kind: z.enum(EVENT_KINDS), v: z.literal(EVENT_VERSION), at: AtSchema,
  /** Milliseconds since the event before in this sitting, by the monotonic clock; null after a reload. */
  since: z.number().int().min(0).max(2_000_000_000).nullable(),
  body: z.unknown(),
})
type Envelope = Omit<z.infer<typeof EnvelopeSchema>, 'kind' | 'body'>
export type EventOf<K extends EventKind> = Envelope & { kind: K, body: Bodies[K] }
export type BenchEvent = { [K in EventKind]: EventOf<K> }[EventKind]

/** Reads one event as it was sent, or null when its shape is not this version's. */
export function readEvent(raw: unknown): BenchEvent | null {
  const envelope = EnvelopeSchema.safeParse(raw)
  if (!envelope.success) return null
  const body = BODIES[envelope.data.kind].safeParse(envelope.data.body)
  // The schema of the body was picked by the kind beside it, which TypeScript cannot follow through the union.
  return body.success ? { ...envelope.data, body: body.data } as BenchEvent : null
}

/** An event that the server has numbered. `late`: kept and shown, of no effect on the state. */
export type StoredEvent = BenchEvent & { n: number, late: boolean }
/** An event on its way: numbered, or not yet. */
export type AnyEvent = BenchEvent & { n?: number, late?: boolean }

/** SHA-256 of the canonical event; the server's own members are not in it. */
export function shaOfEvent(event: BenchEvent): string {
  const { id, piece, round, tablet, seq, actor, kind, v, at, since, body } = event
  return sha256(canonical({ id, piece, round, tablet, seq, actor, kind, v, at, since, body }))
}

export const isMakerKind = (kind: EventKind): kind is MakerKind => (MAKER_KINDS as readonly string[]).includes(kind)

/** A number as decimal text in its base unit, to 12 places at most, without an exponent. */
export function decimal(value: number): string {
  if (!Number.isFinite(value)) throw new RangeError('A figure must be a finite number.')
  const text = value.toFixed(12).replace(/\.?0+$/, '')
  return text === '-0' ? '0' : text
}

/** A batch as a tablet sends it. Events are read one by one, so that one from a newer application does not spoil the rest. */
export const BatchSchema = z.strictObject({ tablet: UlidSchema, sentAt: AtSchema, events: z.array(z.unknown()).min(1).max(100) })
/** What can be read of an event that this server does not know. */
export const HeadSchema = z.object({ id: UlidSchema, kind: z.string().max(40), v: z.number().int(), actor: UlidSchema, piece: UlidSchema, tablet: UlidSchema, seq: z.number().int() })
