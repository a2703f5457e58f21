import { z } from 'zod'
import { UlidSchema } from '../bench/events'
import { EmailSchema } from './entry'
import { AGE_BANDS, ROLE_ACTS, ROLES } from './lists'

const DaySchema = z.iso.date('A day, as 2026-09-08.')
export const PersonParamsSchema = z.strictObject({ person: UlidSchema })
export const ClassParamsSchema = z.strictObject({ class: UlidSchema })
const NameSchema = z.string().trim().min(1, 'Missing: name.').max(120, 'At most 120 letters.')

/** A person joins by a mailed invitation, or without e-mail, to come in by a start card. */
export const InviteBodySchema = z.strictObject({
  id: UlidSchema, name: NameSchema, email: EmailSchema.optional(), roles: z.array(z.enum(ROLES)).min(1, 'Choose at least one part.').max(4), ageBand: z.enum(AGE_BANDS).default('adult'), classId: UlidSchema.optional(),
})
export const RoleBodySchema = z.strictObject({ id: UlidSchema, role: z.enum(ROLES), act: z.enum(ROLE_ACTS) })
export const TERM_SAYS = 'The term ends after it begins.'
const ClassFieldsSchema = z.strictObject({ name: NameSchema, termFrom: DaySchema, termTo: DaySchema, weekday: z.number().int().min(1).max(7) })
export const NewClassBodySchema = ClassFieldsSchema.extend({ id: UlidSchema }).refine(body => body.termFrom <= body.termTo, { path: ['termTo'], message: TERM_SAYS })
export const ChangeClassBodySchema = ClassFieldsSchema.partial()
export const ClassAndPersonParamsSchema = z.strictObject({ class: UlidSchema, person: UlidSchema })
export const ClassAndLessonParamsSchema = z.strictObject({ class: UlidSchema, lesson: UlidSchema })
export const InvitationParamsSchema = z.strictObject({ invitation: UlidSchema })
export const LetterParamsSchema = z.strictObject({ letter: UlidSchema })
export const ClassPersonBodySchema = z.strictObject({ personId: UlidSchema })
export const ClassLessonBodySchema = z.strictObject({ id: UlidSchema, lessonId: UlidSchema })
export const CardsBodySchema = z.strictObject({ people: z.array(UlidSchema).min(1, 'Choose who gets a card.').max(60), on: DaySchema.optional() })
