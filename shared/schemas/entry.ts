import { z } from 'zod'
import { UlidSchema } from '../bench/events'
import { GROUNDS, HANDS } from './lists'

/** Passwords nobody should have; ASVS asks that common ones be refused. From memory, the first of any such list. */
const COMMON = new Set(['password', 'password1', 'passw0rd', '12345678', '123456789', '1234567890', 'qwertyui', 'qwerty123', 'qwertyuiop', '11111111', '00000000', 'abc12345', 'abcd1234', 'iloveyou', 'sunshine', 'princess', 'football', 'baseball', 'welcome1',
  'superman', 'trustno1', 'letmein1', 'dragon12', 'whatever', 'starwars', 'computer', 'michelle', 'jennifer', 'corvette', 'internet', 'jewellery', 'jewelry1', 'goldsmith', 'silversmith', 'thirdhand'])

export const EmailSchema = z.string().trim().min(1, 'Missing: e-mail.').max(254, 'This e-mail is too long.').pipe(z.email('This is no e-mail address.'))
/** Any letters, at least 8; nothing is cut off. */
export const NewPasswordSchema = z.string().min(8, 'At least 8 letters.').max(200, 'At most 200 letters.').refine(text => !COMMON.has(text.toLowerCase()), 'Too many people use this one. Three odd words are good.')

export const ComeInBodySchema = z.strictObject({ email: EmailSchema, password: z.string().min(1, 'Missing: password.').max(200) })
export const CardBodySchema = z.strictObject({ code: z.string().trim().min(1, 'Missing: the code on your card.').max(20) })
const LinkSchema = z.string().regex(/^[A-Za-z0-9_-]{43}$/, 'This link is not whole. Open it from the letter again.')
export const LinkBodySchema = z.strictObject({ token: LinkSchema })
/** The answer to a mailed link. A password that is new is measured by the new password's rules. */
export const AnswerBodySchema = z.strictObject({ token: LinkSchema, name: z.string().trim().min(1, 'Missing: your name.').max(120).optional(), password: z.string().min(1, 'Missing: password.').max(200) })
export const NewAnswerBodySchema = AnswerBodySchema.extend({ password: NewPasswordSchema })
export const EmailBodySchema = z.strictObject({ email: EmailSchema })
export const StudioBodySchema = z.strictObject({ studioId: UlidSchema })
export const MeBodySchema = z.strictObject({ hand: z.enum(HANDS), ground: z.enum(GROUNDS), textSize: z.number().int().min(100).max(400) }).partial()
