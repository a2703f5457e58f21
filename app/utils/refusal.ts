import { FetchError } from 'ofetch'

const AWAY = 'The studio cannot be reached. What you said is kept here; try again when it can.'

export interface Refusal { statusCode: number, says: string, fieldErrors: Record<string, string[]> }

/** What the server said no with, as a sentence for the person. What they typed is kept in every case. */
export function refusalOf(failure: unknown): Refusal {
  // What a page's own fetch failed with comes wrapped: an answer of the server as FetchError, no answer at all as the browser's TypeError.
  const cause = failure instanceof Error ? failure.cause : null
  const error = failure instanceof FetchError ? failure : cause
  if (cause instanceof TypeError) return { statusCode: 0, says: AWAY, fieldErrors: {} }
  if (!(error instanceof FetchError)) return { statusCode: 0, says: 'Something here went wrong. What you said is kept; try again.', fieldErrors: {} }
  const statusCode = error.statusCode ?? 0
  if (statusCode === 0) return { statusCode, says: AWAY, fieldErrors: {} }
  if (statusCode >= 500) return { statusCode, says: 'Something went wrong at the studio. What you said is kept here; try again.', fieldErrors: {} }
  const data: unknown = error.data
  const says = typeof data === 'object' && data !== null && 'message' in data && typeof data.message === 'string' ? data.message : 'That was refused.'
  const inner = typeof data === 'object' && data !== null && 'data' in data && typeof data.data === 'object' && data.data !== null ? data.data : {}
  const fieldErrors = 'fieldErrors' in inner && typeof inner.fieldErrors === 'object' && inner.fieldErrors !== null ? inner.fieldErrors as Record<string, string[]> : {}
  return { statusCode, says: statusCode === 401 ? 'Say who you are again. What you said is kept here.' : says, fieldErrors }
}
