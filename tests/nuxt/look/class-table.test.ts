import { mountSuspended } from '@nuxt/test-utils/runtime'
import { afterEach, describe, expect, it } from 'vitest'
import ClassTable from '~/components/classes/ClassTable.vue'
import { cellOf, type Cell, type TableRow } from '#shared/judging/class-table'
import { USUAL_SETTINGS } from '#shared/judging/settings'

const TODAY = '2026-11-12'
const LESSONS = ['Bench safety', 'Jump rings', 'Wrapped-loop link']
const columns = LESSONS.map((title, i) => ({ id: `l${i}`, slug: `l${i}`, title }))
const cell = (person: string, i: number): Cell => cellOf({ person, lesson: `l${i}` }, i === 2 && person === 'dev'
  ? { levelSigned: 2, oneSignature: false, aliveOn: TODAY, keeps: 182, openPiece: 'x', placeNo: 4, places: 14, waitingOn: null, sentBackOn: null }
  : null, null, USUAL_SETTINGS, TODAY)
const rows: TableRow[] = ['amy', 'dev', 'kit'].map(id => ({ id, name: id === 'dev' ? 'Dev Rana' : id, lastAt: id === 'kit' ? null : TODAY, cells: LESSONS.map((_, i) => cell(id, i)) }))

const mounted: { unmount: () => void }[] = []
afterEach(() => { for (const one of mounted.splice(0)) one.unmount() })
async function table(marked: { cells: string[], people: string[] } = { cells: [], people: [] }) {
  const one = await mountSuspended(ClassTable, { props: { columns, rows, today: TODAY, marked }, attachTo: document.body })
  mounted.push(one)
  return one
}
type Table = Awaited<ReturnType<typeof table>>
async function press(one: Table, key: string, ctrlKey = false) {
  await one.get('table').trigger('keydown', { key, ctrlKey })
  await new Promise(resolve => requestAnimationFrame(resolve))
}
const at = () => document.activeElement?.getAttribute('data-at')
const first = (one: Table) => one.get<HTMLButtonElement>('[data-at="0 0"]')

describe('the class table', () => {
  it('is a table with heads of its rows and columns, each cell told in words', async () => {
    const one = await table()
    expect(one.findAll('thead th[scope="col"]').map(head => head.text())).toEqual(['Apprentice', ...LESSONS, 'Last at bench'])
    expect(one.findAll('tbody th[scope="row"]').map(head => head.text())).toEqual(['amy', 'Dev Rana', 'kit'])
    const button = one.get('[data-at="1 2"]')
    expect(button.attributes('aria-label')).toBe('Dev Rana, Wrapped-loop link: With me beside you, 2; at the bench, step 4 of 14')
    expect(button.text()).toContain('4/14')
    expect(one.findAll('tbody tr')[2]?.text()).toContain('never')
  })
  it('has one cell in the order of Tab; arrows, Home and End move it and stop at the edges', async () => {
    const one = await table()
    expect(one.findAll('td button[tabindex="0"]')).toHaveLength(1)
    first(one).element.focus()
    await press(one, 'ArrowRight')
    expect(at()).toBe('0 1')
    await press(one, 'ArrowDown')
    await press(one, 'End')
    expect(at()).toBe('1 2')
    await press(one, 'ArrowRight')
    expect(at()).toBe('1 2')
    await press(one, 'End', true)
    expect(at()).toBe('2 2')
    await press(one, 'ArrowDown')
    expect(at()).toBe('2 2')
    await press(one, 'Home')
    expect(at()).toBe('2 0')
    await press(one, 'Home', true)
    expect(at()).toBe('0 0')
    expect(one.findAll('td button[tabindex="0"]').map(button => button.attributes('data-at'))).toEqual(['0 0'])
  })
  it('tells the cell one stands on, and opens it when it is pressed', async () => {
    const one = await table()
    one.get<HTMLButtonElement>('[data-at="1 2"]').element.focus()
    expect(one.emitted('at')?.at(-1)).toEqual([rows[1]?.cells[2]])
    expect(one.emitted('open')).toBeUndefined()
    await one.get('[data-at="1 2"]').trigger('click')
    expect(one.emitted('open')).toEqual([[rows[1]?.cells[2]]])
  })
  it('marks what a tally is about, takes the place to the first of it, and unmarks it', async () => {
    const one = await table()
    await one.setProps({ marked: { cells: ['dev l2'], people: [] } })
    await new Promise(resolve => requestAnimationFrame(resolve))
    expect(one.findAll('button.bg-brass-light').map(button => button.attributes('data-at'))).toEqual(['1 2'])
    expect(one.get('td button[tabindex="0"]').attributes('data-at')).toBe('1 2')
    await one.setProps({ marked: { cells: [], people: ['kit'] } })
    expect(one.findAll('button.bg-brass-light').map(button => button.attributes('data-at'))).toEqual(['2 0', '2 1', '2 2'])
    await one.setProps({ marked: { cells: [], people: [] } })
    expect(one.findAll('button.bg-brass-light')).toHaveLength(0)
  })
})
