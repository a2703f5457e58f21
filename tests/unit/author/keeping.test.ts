import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { beginWith, MOST_ASIDE, withAside, type Slot } from '~/utils/author/keeping'

const slot = (source: string, etag: string, minute: number): Slot => ({ source, etag, at: `2026-03-02T10:${String(minute).padStart(2, '0')}:00.000Z` })

describe('what the writing page begins with', () => {
  it('is the studio’s text where nothing lies on the device', () => {
    expect(beginWith({ source: 'A', etag: '1' }, [])).toEqual({ source: 'A', etag: '1', from: 'studio', aside: [] })
  })

  it('is the newest unsent text that was written on the studio’s own', () => {
    expect(beginWith({ source: 'A', etag: '1' }, [slot('A older', '1', 1), slot('A newer', '1', 2)]))
      .toMatchObject({ source: 'A newer', from: 'here', aside: [{ source: 'A older' }] })
  })

  it('is the studio’s text where the device wrote on an older one, which is set aside', () => {
    expect(beginWith({ source: 'B', etag: '2' }, [slot('A mine', '1', 1)])).toMatchObject({ source: 'B', from: 'studio', aside: [{ source: 'A mine' }] })
  })

  it('never loses a text: each that differs from the studio’s is taken up or set aside', () => {
    const slots = fc.array(fc.record({ source: fc.string(), etag: fc.constantFrom('1', '2'), at: fc.constantFrom('2026-01-01', '2026-01-02') }))
    fc.assert(fc.property(fc.string(), slots, (source, lying) => {
      const begun = beginWith({ source, etag: '1' }, lying)
      const held = new Set([begun.source, source, ...begun.aside.map(one => one.source)])
      for (const one of lying) expect(held.has(one.source)).toBe(true)
    }))
  })

  it('keeps the newest texts set aside, each once', () => {
    const many = Array.from({ length: 14 }, (_, n) => ({ source: `text ${n % 12}`, at: `2026-03-02T10:${n + 10}:00.000Z`, whose: 'yours' }))
    const kept = withAside(many.slice(0, 5), many.slice(5))
    expect(kept).toHaveLength(MOST_ASIDE)
    expect(kept[0]?.source).toBe('text 1')
    expect(new Set(kept.map(one => one.source)).size).toBe(MOST_ASIDE)
  })
})
