/** What the tests read out of answers. */
import { z } from 'zod'
import { ROLES } from '#shared/schemas/lists'

export const MeSchema = z.object({
  person: z.object({ id: z.string(), name: z.string(), hand: z.string() }), studio: z.object({ id: z.string(), name: z.string() }).nullable(),
  studios: z.array(z.object({ id: z.string() })), roles: z.array(z.enum(ROLES)), may: z.array(z.string()), byCard: z.boolean(), hasEmail: z.boolean(),
})
export const PeopleSchema = z.object({
  people: z.array(z.object({ id: z.string(), name: z.string(), roles: z.array(z.enum(ROLES)), leftAt: z.string().nullable(), hasEmail: z.boolean(), cardUntil: z.string().nullable(), ageBand: z.string() })),
  invitations: z.array(z.object({ id: z.string(), name: z.string(), email: z.string(), ends: z.string() })),
})
export const ClassSchema = z.object({ id: z.string(), name: z.string(), people: z.array(z.object({ id: z.string(), name: z.string() })), lessons: z.array(z.object({ id: z.string() })) })
export const CardsSchema = z.object({ className: z.string(), on: z.string(), ends: z.string(), cards: z.array(z.object({ personId: z.string(), name: z.string(), code: z.string() })) })
