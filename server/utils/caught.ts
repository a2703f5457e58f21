import { z } from 'zod'

const CaughtSchema = z.array(z.object({ id: z.string(), at: z.string(), to: z.array(z.string()), subject: z.string(), text: z.string() }))
export type Caught = z.infer<typeof CaughtSchema>

/** What the catcher on this machine has caught, newest first. Letters are shown as plain text only. */
export async function caughtLetters(catcherUrl: string): Promise<Caught> {
  return CaughtSchema.parse(await $fetch<unknown>('/mails', { baseURL: catcherUrl }))
}
