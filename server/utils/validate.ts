import type { H3Event } from 'h3'
import { z } from 'zod'
import { sentenceOf } from '#shared/schemas/sentences'
import { NOT_HERE, refuse } from '#server/services/refuse'

const NOT_READ = 'Something here is missing or cannot be read.'
const ONLY_JSON = 'This is sent as JSON.'

/** By the schema, or 400 with a sentence for each field that has something wrong. Fields nobody asked for are refused by strict schemas. */
function checked<S extends z.ZodType>(schema: S, value: unknown): z.output<S> {
  const read = schema.safeParse(value, { error: sentenceOf })
  if (read.success) return read.data
  const { fieldErrors, formErrors } = z.flattenError(read.error)
  refuse(400, NOT_READ, { fieldErrors, formErrors })
}

/** The parts of the address. What is no id at all is not there: 404, as for what is another studio's. */
export async function readParams<S extends z.ZodType>(event: H3Event, schema: S): Promise<z.output<S>> {
  const read = schema.safeParse(getRouterParams(event, { decode: true }))
  if (!read.success) refuse(404, NOT_HERE)
  return read.data
}

/** What stands after the question mark. */
export async function readQuery<S extends z.ZodType>(event: H3Event, schema: S): Promise<z.output<S>> {
  return checked(schema, getQuery(event))
}

/** The JSON body by its schema. */
export async function readJson<S extends z.ZodType>(event: H3Event, schema: S): Promise<z.output<S>> {
  if (!/^application\/json\s*(?:;|$)/i.test(getHeader(event, 'content-type') ?? '')) refuse(400, ONLY_JSON)
  return checked(schema, asJson(await readRawBody(event, 'utf8') ?? ''))
}

function asJson(text: string): unknown {
  try {
    return JSON.parse(text)
  }
  catch {
    refuse(400, ONLY_JSON)
  }
}
