import { mountSuspended } from '@nuxt/test-utils/runtime'
import { describe, expect, it } from 'vitest'
import type { Finding } from '#shared/lesson/schema'
import WriteNotes from '~/components/author/WriteNotes.vue'

const error: Finding = { code: 'keyword-colon', severity: 'error', message: 'HOLD has no colon behind it.', from: 40, to: 41, line: 3, column: 5, mend: { from: 40, to: 41, text: '', says: 'Take the colon out' } }
const advice: Finding = { code: 'no-picture-no-measure', severity: 'advice', message: 'This step has no picture and no measure.', from: 60, to: 70, line: 4, column: 1 }
const mount = (current: Finding | null = null) => mountSuspended(WriteNotes, { props: { findings: [error, advice], current, topOf: (line: number) => line * 26, placeOf: (offset: number) => `Step ${offset}` } })

describe('notes in the margin', () => {
  it('say where, what, and whether it is an error, in the order of the text', async () => {
    const notes = (await mount()).findAll('li')
    expect(notes.map(note => note.text())).toEqual(['Step 40, line 3, errorHOLD has no colon behind it.Take the colon out', 'Step 60, line 4, adviceThis step has no picture and no measure.'])
    expect(notes.map(note => note.attributes('data-line'))).toEqual(['3', '4'])
  })

  it('stand at their lines and never on each other', async () => {
    const tops = (await mount()).findAll('li').map(note => Number.parseFloat(note.element.style.top))
    expect(tops[0]).toBe(78)
    expect(tops[1]).toBeGreaterThanOrEqual(104)
  })

  it('go to their place when pressed, and mend where there is a mend', async () => {
    const notes = await mount()
    const buttons = notes.findAll('button')
    expect(buttons.map(button => button.text())).toHaveLength(3)
    await buttons[2]?.trigger('click')
    await buttons[1]?.trigger('click')
    expect(notes.emitted('go')).toEqual([[advice]])
    expect(notes.emitted('mend')).toEqual([[error]])
  })

  it('show which one is chosen, also after the text was compiled anew', async () => {
    const notes = (await mount({ ...advice })).findAll('li')
    expect(notes.map(note => note.classes('outline'))).toEqual([false, true])
  })
})
