/**
 * The compiled lesson: what the compiler makes of a lesson file, what is kept with a revision for ever, and what the
 * player, the server and print run on. Plain data only. `format` goes up when the shape changes in a way that an old
 * reader would misread; kept values of an older format are read as they stand.
 */
import { z } from 'zod'

export const LESSON_FORMAT = 1
/** Number of the figure engine: goes up whenever a formula of `shared/trade` or the evaluator gives another value. */
export const FIGURE_ENGINE = 1
/** Number of the compiler that made the value. */
export const COMPILER = 1

export const CRAFTS = ['wire', 'cord', 'metal', 'setting', 'finishing', 'studio'] as const
export const PERMISSIONS = ['flame', 'motors', 'pickle', 'mill', 'goods'] as const
export const SIGNAL_WORDS = ['DANGER', 'WARNING', 'CAUTION', 'NOTICE'] as const
export const SIZE_UNITS = ['mm', 'count', 'number', 'g', 'deg', 'wire', 'cord', 'metal', 'choice', 'yes_no'] as const
export const KINDS = ['number', 'count', 'length', 'area', 'mass', 'angle', 'time', 'force', 'money', 'metal', 'yes_no', 'choice'] as const
export const WITNESS = ['always', 'below 3', 'below 4'] as const
export const ONCE = ['stick', 'session', 'piece'] as const
export const STOPS = ['good', 'never'] as const
export const DRAWINGS = ['strip', 'loop', 'coil', 'cap', 'scroll', 'strand', 'plan'] as const
export const FUNCTIONS = ['ring', 'coil', 'scroll', 'scroll_width', 'scroll_for', 'cap', 'cap_width', 'turns_for_cap', 'strand', 'graduated',
  'knot_width', 'knot_cord', 'passes', 'ream_to', 'wall', 'wire_mass', 'cost', 'ring_blank', 'disc', 'sqrt', 'min', 'max', 'nearest', 'up', 'down'] as const
/** Base units. Every length is kept in mm, mass in g, time in s, angle in deg, force in N, area in mm2. */
export const FIGURE_UNITS = ['mm', 'cm', 'm', 'in', 'g', 'mg', 'N', 'deg', 's', 'min', 'h'] as const

export type Craft = (typeof CRAFTS)[number]
export type Permission = (typeof PERMISSIONS)[number]
export type SignalWord = (typeof SIGNAL_WORDS)[number]
export type SizeUnit = (typeof SIZE_UNITS)[number]
export type Kind = (typeof KINDS)[number]
export type Witness = (typeof WITNESS)[number]
export type FunctionName = (typeof FUNCTIONS)[number]

/** Where a part of a lesson stands in its source: offsets in UTF-16 units, `to` exclusive; line from 1. */
export const RangeSchema = z.object({ from: z.number().int(), to: z.number().int(), line: z.number().int() })
export type Range = z.infer<typeof RangeSchema>

// ---- Expressions, as plain nodes ------------------------------------------------------------------------------------

export type Node =
  | { k: 'num', v: number, unit?: (typeof FIGURE_UNITS)[number] }
  | { k: 'name', n: string }
  | { k: 'text', v: string }
  | { k: 'op', op: '+' | '-' | '*' | '/' | '^', a: Node, b: Node }
  | { k: 'neg', a: Node }
  | { k: 'cmp', op: '==' | '!=' | '<' | '<=' | '>' | '>=', a: Node, b: Node }
  | { k: 'and' | 'or', a: Node, b: Node }
  | { k: 'not', a: Node }
  | { k: 'call', f: FunctionName, args: Node[] }

export const NodeSchema: z.ZodType<Node> = z.lazy(() => z.union([
  z.object({ k: z.literal('num'), v: z.number(), unit: z.enum(FIGURE_UNITS).optional() }),
  z.object({ k: z.literal('name'), n: z.string() }),
  z.object({ k: z.literal('text'), v: z.string() }),
  z.object({ k: z.literal('op'), op: z.enum(['+', '-', '*', '/', '^']), a: NodeSchema, b: NodeSchema }),
  z.object({ k: z.literal('neg'), a: NodeSchema }),
  z.object({ k: z.literal('cmp'), op: z.enum(['==', '!=', '<', '<=', '>', '>=']), a: NodeSchema, b: NodeSchema }),
  z.object({ k: z.enum(['and', 'or']), a: NodeSchema, b: NodeSchema }),
  z.object({ k: z.literal('not'), a: NodeSchema }),
  z.object({ k: z.literal('call'), f: z.enum(FUNCTIONS), args: z.array(NodeSchema) }),
]))

// ---- Text, as a tree: no HTML exists anywhere between the source and the screen ----------------------------------------

export type Inline =
  | { t: 'text', v: string }
  | { t: 'figure', name: string, to?: number } // {cut to 0.5}
  | { t: 'turning', v: 'clockwise' | 'anticlockwise' } // follows the hand unless object_may_mirror: no
  | { t: 'strong' | 'em', c: Inline[] }
  | { t: 'code', v: string }
  | { t: 'link', href: string, c: Inline[] }
  | { t: 'break' }

export type Block =
  | { t: 'p', c: Inline[] }
  | { t: 'ul' | 'ol', items: Block[][] }
  | { t: 'quote', c: Block[] }
  | { t: 'fence', v: string }
  | { t: 'rule' }

export const InlineSchema: z.ZodType<Inline> = z.lazy(() => z.union([
  z.object({ t: z.literal('text'), v: z.string() }),
  z.object({ t: z.literal('figure'), name: z.string(), to: z.number().positive().optional() }),
  z.object({ t: z.literal('turning'), v: z.enum(['clockwise', 'anticlockwise']) }),
  z.object({ t: z.enum(['strong', 'em']), c: z.array(InlineSchema) }),
  z.object({ t: z.literal('code'), v: z.string() }),
  z.object({ t: z.literal('link'), href: z.string(), c: z.array(InlineSchema) }),
  z.object({ t: z.literal('break') }),
]))
export const BlockSchema: z.ZodType<Block> = z.lazy(() => z.union([
  z.object({ t: z.literal('p'), c: z.array(InlineSchema) }),
  z.object({ t: z.enum(['ul', 'ol']), items: z.array(z.array(BlockSchema)) }),
  z.object({ t: z.literal('quote'), c: z.array(BlockSchema) }),
  z.object({ t: z.literal('fence'), v: z.string() }),
  z.object({ t: z.literal('rule') }),
]))
const inlines = z.array(InlineSchema)
const blocks = z.array(BlockSchema)

// ---- Sizes, figures, readings, criteria --------------------------------------------------------------------------------

/** The value of a size in its base unit: a number (mm, g, deg, count, number), the text of a choice or metal, or yes/no. */
export const SizeValueSchema = z.union([z.number(), z.string(), z.boolean()])
export type SizeValue = z.infer<typeof SizeValueSchema>

export const SizeSchema = z.object({
  name: z.string(), ask: z.string(), unit: z.enum(SIZE_UNITS), usual: SizeValueSchema,
  /** What the lesson covers; outside it only practice. In base units. */
  from: z.number().nullable(), to: z.number().nullable(), step: z.number().nullable(),
  /** For choice; also narrows cord and metal. */
  choices: z.array(z.string()), range: RangeSchema,
})
export type Size = z.infer<typeof SizeSchema>

export const FigureSchema = z.object({ name: z.string(), kind: z.enum(KINDS), node: NodeSchema, source: z.string(), range: RangeSchema })
export type Figure = z.infer<typeof FigureSchema>

/** Tolerance at a level and below: `at level 2: 0.3 mm`. */
const atLevel = z.object({ level: z.number().int(), within: NodeSchema })
export const ReadingSchema = z.object({
  name: z.string(), ask: z.string(), unit: z.enum(['mm', 'g', 'N', 'deg', 'count', 'number']),
  is: NodeSchema.nullable(), sampleOf: z.string().nullable(),
  within: NodeSchema.nullable(), atLevels: z.array(atLevel), step: z.number().nullable(), times: z.number().int().min(1), agree: NodeSchema.nullable(),
  with: z.string().nullable(), less: NodeSchema.nullable(), gives: z.string().nullable(), range: RangeSchema,
})
export type Reading = z.infer<typeof ReadingSchema>

export const CriterionSchema = z.object({
  key: z.string(), by: z.enum(['judge', 'measure', 'spread']),
  /** What the judge reads: the `judge` text, or `say` of a measured one. */
  says: z.string(), reading: z.string().nullable(), how: z.string().nullable(), essential: z.boolean(), live: z.boolean(), when: NodeSchema.nullable(),
  within: NodeSchema.nullable(), atLevels: z.array(atLevel), pictures: z.record(z.string(), z.string()), range: RangeSchema,
})
export type Criterion = z.infer<typeof CriterionSchema>

export const MaterialSchema = z.object({
  name: z.string(), metal: NodeSchema.nullable(), wire: NodeSchema.nullable(), cord: NodeSchema.nullable(), size: NodeSchema.nullable(),
  each: NodeSchema.nullable(), length: NodeSchema.nullable(), spare: NodeSchema.nullable(), when: NodeSchema.nullable(), range: RangeSchema,
})
export type Material = z.infer<typeof MaterialSchema>

// ---- Steps -----------------------------------------------------------------------------------------------------------

export const ChoiceSchema = z.object({ key: z.string(), says: inlines, right: z.boolean(), /** Fault and cure, for a wrong one. */ fault: inlines.nullable(), range: RangeSchema })
export type Choice = z.infer<typeof ChoiceSchema>
const choices = { question: blocks, choices: z.array(ChoiceSchema), fixed: z.boolean() }

export const AskSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('count'), is: NodeSchema, question: inlines }),
  z.object({ kind: z.literal('measure'), reading: z.string() }),
  z.object({ kind: z.literal('photo'), prompt: inlines }),
  z.object({ kind: z.literal('choices'), ...choices }),
])
export type Ask = z.infer<typeof AskSchema>

export const HoldSchema = z.object({
  consequence: inlines, text: blocks, asks: z.array(AskSchema).min(1), wrong: inlines.nullable(), witness: z.enum(WITNESS).nullable(),
  once: z.enum(ONCE), when: NodeSchema.nullable(), range: RangeSchema,
})
export type Hold = z.infer<typeof HoldSchema>

export const SafetySchema = z.object({ word: z.enum(SIGNAL_WORDS), hazard: inlines, avoid: blocks, when: NodeSchema.nullable(), range: RangeSchema })
export type Safety = z.infer<typeof SafetySchema>
export const CheckSchema = z.object({ ...choices, when: NodeSchema.nullable(), range: RangeSchema })
export type Check = z.infer<typeof CheckSchema>
export const ReadingHereSchema = z.object({ reading: z.string(), text: blocks, when: NodeSchema.nullable(), range: RangeSchema })
export const PhotoHereSchema = z.object({ prompt: inlines, when: NodeSchema.nullable(), range: RangeSchema })
export const WaitSchema = z.object({ length: NodeSchema, why: inlines.nullable(), when: NodeSchema.nullable(), range: RangeSchema })
export const FaultSchema = z.object({ key: z.string(), sees: inlines, because: inlines, do: inlines, when: NodeSchema.nullable(), range: RangeSchema })
export type Fault = z.infer<typeof FaultSchema>
export const DrawingSchema = z.object({ kind: z.enum(DRAWINGS), args: z.record(z.string(), z.array(NodeSchema)), when: NodeSchema.nullable(), range: RangeSchema })
export type Drawing = z.infer<typeof DrawingSchema>
export const PictureSchema = z.object({ name: z.string(), alt: inlines, mirror: z.boolean(), range: RangeSchema })
export type Picture = z.infer<typeof PictureSchema>
export const AsideSchema = z.object({ text: blocks, when: NodeSchema.nullable(), range: RangeSchema })

export const StepSchema = z.object({
  key: z.string(), title: inlines, range: RangeSchema, repeat: NodeSchema.nullable(), say: z.string().nullable(), when: NodeSchema.nullable(),
  stop: z.enum(STOPS).nullable(), oneAct: z.boolean(), heat: z.boolean(), usual: z.number().nullable(),
  needs: z.enum(PERMISSIONS).nullable(), instead: inlines.nullable(),
  safety: z.array(SafetySchema), holds: z.array(HoldSchema), text: blocks, pictures: z.array(PictureSchema), drawings: z.array(DrawingSchema),
  checks: z.array(CheckSchema), readings: z.array(ReadingHereSchema), photos: z.array(PhotoHereSchema), waits: z.array(WaitSchema),
  faults: z.array(FaultSchema), why: z.array(AsideSchema), feel: z.array(AsideSchema),
})
export type Step = z.infer<typeof StepSchema>

export const PartSchema = z.object({
  key: z.string(), title: inlines, range: RangeSchema, repeat: NodeSchema.nullable(), say: z.string().nullable(), order: z.enum(['each', 'step']),
  when: NodeSchema.nullable(), stop: z.enum(STOPS).nullable(), text: blocks, steps: z.array(StepSchema),
})
export type Part = z.infer<typeof PartSchema>

export const LessonSchema = z.object({
  format: z.literal(LESSON_FORMAT), title: z.string(), craft: z.enum(CRAFTS), piece: z.string(), covers: z.string(), notFor: z.string(), atStake: z.string(),
  needs: z.array(z.string()), permissions: z.array(z.enum(PERMISSIONS)), torch: z.string().nullable(),
  /** Minutes. */ time: z.object({ maker: z.number(), first: z.number(), later: z.number() }),
  /** Days a sign-off lives without practice. */ keeps: z.number(),
  expected: z.object({ level: z.number(), week: z.number() }).nullable(), objectMayMirror: z.boolean(),
  tools: z.array(z.string()), materials: z.array(MaterialSchema), sizes: z.array(SizeSchema), figures: z.array(FigureSchema), readings: z.array(ReadingSchema),
  criteria: z.array(CriterionSchema), closing: z.array(z.object({ key: z.string(), says: z.string() })),
  opening: blocks, faults: z.array(FaultSchema), parts: z.array(PartSchema),
})
export type Lesson = z.infer<typeof LessonSchema>

// ---- Findings ----------------------------------------------------------------------------------------------------------

/** One thing the compiler has to say about a source. An error keeps a lesson from use; advice does not. */
export interface Finding {
  code: string
  severity: 'error' | 'advice'
  /** A sentence that says what to do. */
  message: string
  from: number
  to: number
  /** From 1. */
  line: number
  column: number
  /** An edit that mends it. */
  mend?: { from: number, to: number, text: string, says: string }
}

export interface Compiled { lesson: Lesson, findings: Finding[] }
