import { createError } from 'h3'

/** Statuses a service may refuse with; what each means stands in docs/architecture.md. */
export type RefusalStatus = 400 | 401 | 403 | 404 | 409 | 413 | 422 | 429

/** Throws what the handlers answer with. `says` is a sentence a person can act on; `data` goes to the page with it. */
export function refuse(statusCode: RefusalStatus, says: string, data?: Record<string, unknown>): never {
  throw createError({ statusCode, message: says, data })
}

export const NOT_HERE = 'There is nothing here, or it is not yours to see.'

/** The row, or 404: the same sentence for what is not there and for what is another studio's. */
export function found<T>(row: T | undefined | null): T {
  if (row === undefined || row === null) refuse(404, NOT_HERE)
  return row
}
