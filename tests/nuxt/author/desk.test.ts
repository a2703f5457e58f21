import { mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import { createError, readBody } from 'h3'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { DraftBody } from '#shared/schemas/lessons'
import type { DraftView } from '#shared/types/lessons'
import WriteDesk from '~/components/author/WriteDesk.vue'

const LESSON = '01ARZ3NDEKTSV4RRFFQ69G5FAV'
const READER = '01ARZ3NDEKTSV4RRFFQ69G5FAW'
const SOURCE = '---\ntitle: Cut to length\ncraft: wire\n---\n\n## Cut it\n\nHOLD: Too late\n  Look at it.\n  right: Yes\n  not: No -> Stop.\n\nCut it.\n'
const view = (more: Partial<DraftView> = {}): DraftView => ({
  reader: READER, lesson: { id: LESSON, slug: 'cut', stage: 'draft' }, source: SOURCE, etag: '01ARZ3NDEKTSV4RRFFQ69G5FA0', savedAt: '2026-03-02T10:41:00.000Z', by: 'Ruth Calder', base: null, pictures: [], slugs: [], previous: null, ...more,
})

/** What the studio answers a save with; each test sets its own. */
let answer: (body: DraftBody) => unknown
let sent: DraftBody[] = []
registerEndpoint(`/api/lessons/${LESSON}/draft`, { method: 'PUT', handler: async (event) => {
  const body: DraftBody = await readBody(event)
  sent.push(body)
  return answer(body)
} })
const kept = () => ({ etag: `01ARZ3NDEKTSV4RRFFQ69G5FB${sent.length}`, savedAt: '2026-03-02T10:42:00.000Z' })
const lying = () => Object.keys(localStorage).filter(key => key.startsWith(`thirdhand:draft:${READER}`)).map(key => String(localStorage.getItem(key)))

const mounted: { unmount: () => void }[] = []
async function open(more: Partial<DraftView> = {}) {
  const desk = await mountSuspended(WriteDesk, { props: { view: view(more), startLine: null }, attachTo: document.body })
  mounted.push(desk)
  const area = desk.get('textarea').element
  const type = (text: string) => desk.get('textarea').setValue(text)
  return { desk, area, type }
}
beforeEach(() => {
  localStorage.clear()
  sent = []
  answer = kept
})
afterEach(() => {
  for (const desk of mounted.splice(0)) desk.unmount()
})

describe('the writing desk', () => {
  it('says what is to be said in words, goes to it by a key and mends it by another', async () => {
    const { desk, area } = await open()
    await vi.waitFor(() => expect(desk.text()).toMatch(/errors?/), { timeout: 25_000 })
    area.focus()
    const places: string[] = []
    for (let n = 0; n < 30 && !places.includes(':'); n++) {
      await desk.trigger('keydown', { key: 'F8' })
      places.push(area.value.slice(area.selectionStart, area.selectionEnd))
    }
    expect(places).toContain(':')
    await desk.trigger('keydown', { key: 'Enter', altKey: true })
    await vi.waitFor(() => expect(area.value).toBe(SOURCE.replace('HOLD: Too', 'HOLD Too')))
  }, 30_000)

  it('keeps what is typed on the device at once, sends it by itself, and then lets the copy go', async () => {
    const { desk, type } = await open()
    await type(`${SOURCE}More.\n`)
    expect(lying()[0]).toContain('More.')
    await vi.waitFor(() => expect(sent).toEqual([{ etag: view().etag, source: `${SOURCE}More.\n` }]), { timeout: 5000 })
    await vi.waitFor(() => expect(lying()).toEqual([]))
    expect(desk.get('[role=status]').text()).toMatch(/kept \d/)
  })

  it('goes on from the copy of the device when a page was closed before it was sent', async () => {
    localStorage.setItem(`thirdhand:draft:${READER}:${LESSON}:gone`, JSON.stringify({ source: 'Unsent.', etag: view().etag, at: '2026-03-02T10:40:00.000Z' }))
    localStorage.setItem('thirdhand:draft:another:person:gone', JSON.stringify({ source: 'Not mine.', etag: view().etag, at: '2026-03-02T10:40:00.000Z' }))
    const { area } = await open()
    expect(area.value).toBe('Unsent.')
    await vi.waitFor(() => expect(sent[0]?.source).toBe('Unsent.'), { timeout: 5000 })
    expect(localStorage.getItem('thirdhand:draft:another:person:gone')).not.toBeNull()
  })

  it('loses neither text when another was kept meanwhile', async () => {
    const other = { by: 'Imran Sethi', isMine: false, at: '2026-03-02T10:41:30.000Z', source: 'By Imran.\n', etag: '01ARZ3NDEKTSV4RRFFQ69G5FA9' }
    answer = body => (body.etag === other.etag ? kept() : Promise.reject(createError({ statusCode: 409, message: 'Another text.', data: other })))
    const { desk, area, type } = await open()
    await type('By Ruth.\n')
    await vi.waitFor(() => expect(desk.get('[role=alert]').text()).toContain('Imran Sethi kept another text'), { timeout: 5000 })
    expect(lying()[0]).toContain('By Ruth.')
    const press = (name: string) => desk.findAll('button').find(button => button.text() === name)?.trigger('click')
    await press('Go on with the other')
    expect(area.value).toBe('By Imran.\n')
    expect(desk.text()).toContain('Texts set aside on this tablet, 1')
    await press('Bring back')
    expect(area.value).toBe('By Ruth.\n')
    await vi.waitFor(() => expect(sent.at(-1)).toEqual({ etag: other.etag, source: 'By Ruth.\n' }), { timeout: 5000 })
  })

  it('takes a text for its own when only the answer was lost', async () => {
    let isLost = true
    answer = (body) => {
      if (isLost) { isLost = false; throw createError({ statusCode: 503 }) }
      // The studio had kept the first text before its answer was lost.
      return body.etag === view().etag && body.source !== 'One.' ? Promise.reject(createError({ statusCode: 409, data: { by: 'Ruth Calder', isMine: true, at: '2026-03-02T10:41:30.000Z', source: 'One.', etag: '01ARZ3NDEKTSV4RRFFQ69G5FA9' } })) : kept()
    }
    const { desk, type } = await open()
    await type('One.')
    await vi.waitFor(() => expect(desk.get('[role=alert]').text()).toContain('out of reach'), { timeout: 5000 })
    await type('One. Two.')
    await vi.waitFor(() => expect(sent.at(-1)).toEqual({ etag: '01ARZ3NDEKTSV4RRFFQ69G5FA9', source: 'One. Two.' }), { timeout: 8000 })
    expect(desk.find('[role=alert]').exists()).toBe(false)
  })

  it('asks who it is, through the page around it, without letting the text go', async () => {
    answer = () => Promise.reject(createError({ statusCode: 401, message: 'Say who you are.' }))
    const { type } = await open()
    expect(useSayWho().value).toBe(false)
    await type('Typed.')
    await vi.waitFor(() => expect(useSayWho().value).toBe(true), { timeout: 5000 })
    expect(lying()[0]).toContain('Typed.')
  })

  it('leaves the Tab key to the person and indents by another', async () => {
    const { desk, area, type } = await open()
    await type('HOLD it\nwrong: no')
    area.setSelectionRange(10, 10)
    const tab = new KeyboardEvent('keydown', { key: 'Tab', cancelable: true, bubbles: true })
    area.dispatchEvent(tab)
    expect(tab.defaultPrevented).toBe(false)
    await desk.get('textarea').trigger('keydown', { key: ']', ctrlKey: true })
    expect(area.value).toBe('HOLD it\n  wrong: no')
  })
})
