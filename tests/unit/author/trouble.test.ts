import { describe, expect, it } from 'vitest'
import { sayTrouble, troubleOf } from '~/utils/author/trouble'

const answer = (statusCode: number | undefined, data?: unknown, message = 'A sentence.') => ({ statusCode, data: { message, data } })
const other = { by: 'Ruth', isMine: false, at: '2026-03-02T10:41:00.000Z', source: 'theirs', etag: '01ARZ3NDEKTSV4RRFFQ69G5FAV' }

describe('why a text was not kept', () => {
  it('tells another’s text from every other refusal', () => {
    expect(troubleOf(answer(409, other))).toEqual({ kind: 'other', conflict: other })
    expect(troubleOf(answer(409, { why: 'put away' }))).toEqual({ kind: 'refused', says: 'A sentence.' })
  })

  it('asks who it is, and tries again what may pass', () => {
    expect(troubleOf(answer(401))).toEqual({ kind: 'who' })
    for (const status of [undefined, 429, 500, 503]) expect(troubleOf(answer(status))).toEqual({ kind: 'away' })
    expect(troubleOf(new TypeError('fetch failed'))).toEqual({ kind: 'away' })
    expect(troubleOf(null)).toEqual({ kind: 'away' })
  })

  it('tells the sentence of the field that is wrong, else that of the answer', () => {
    expect(troubleOf(answer(400, { fieldErrors: { name: ['A plain name.'] } }))).toEqual({ kind: 'refused', says: 'A plain name.' })
    expect(troubleOf(answer(400, { fieldErrors: {} }))).toEqual({ kind: 'refused', says: 'A sentence.' })
    expect(sayTrouble(answer(422), 'Kept.')).toBe('A sentence.')
    expect(sayTrouble(answer(401), 'Kept.')).toBe('Say who you are again. Kept.')
  })
})
