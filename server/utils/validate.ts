import type { H3Event } from 'h3'
import { z } from 'zod'

/** Throws 400 with a sentence for each field that has something wrong. */
function refuseFields(error: z.ZodError): never {
  const { fieldErrors, formErrors } = z.flattenError(error)
  throw createError({ statusCode: 400, message: 'Something here is missing or cannot be read.', data: { fieldErrors, formErrors } })
}

function checked<S extends z.ZodType>(schema: S, value: unknown): z.infer<S> {
  const read = schema.safeParse(value)
  return read.success ? read.data : refuseFields(read.error)
}

/** The parts of the address. What is no id at all is not there: 404, as for what is another studio's. */
export async function readParams<S extends z.ZodType>(event: H3Event, schema: S): Promise<z.infer<S>> {
  const read = schema.safeParse(getRouterParams(event, { decode: true }))
  if (!read.success) throw createError({ statusCode: 404, message: 'There is nothing here, or it is not yours to see.' })
  return read.data
}

export async function readQuery<S extends z.ZodType>(event: H3Event, schema: S): Promise<z.infer<S>> {
  return checked(schema, getQuery(event))
}

/** The JSON body by its schema; an unreadable one is a body with nothing right in it. */
export async function readJson<S extends z.ZodType>(event: H3Event, schema: S): Promise<z.infer<S>> {
  const body: unknown = await readBody(event).catch(() => undefined)
  return checked(schema, body ?? {})
}
