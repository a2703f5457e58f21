import { NoteParamsSchema } from '#shared/schemas/bench'
import { noteRead } from '#server/services/bench-home'

/** The person has read a note. */
export default defineEventHandler(async (event) => {
  const who = await requireMay(event, 'make-pieces')
  const { note } = await readParams(event, NoteParamsSchema)
  await noteRead(useDatabase(), who, note, now(event))
  return { read: true }
})
