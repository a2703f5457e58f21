import type { Criterion, Lesson, Node, Reading } from '#shared/lesson/schema'
import type { PieceStarted } from '#shared/bench/events'
import { setOut, type SetOut } from '#shared/bench/set-out'
import { emptyState, type State, type TakenReading } from '#shared/bench/state'

const range = { from: 0, to: 0, line: 1 }
export const mm = (v: number): Node => ({ k: 'num', v, unit: 'mm' })
export const name = (n: string): Node => ({ k: 'name', n })
export const judged = (key: string, more: Partial<Criterion> = {}): Criterion => ({
  key, by: 'judge', says: `Line ${key}`, reading: null, how: null, essential: false, live: false, when: null, within: null, atLevels: [], pictures: {}, range, ...more,
})
export const reading = (named: string, more: Partial<Reading> = {}): Reading => ({
  name: named, ask: named, unit: 'mm', is: name('across'), sampleOf: null, within: mm(0.2), atLevels: [{ level: 2, within: mm(0.3) }], step: 0.1, times: 1, agree: null, with: 'Calliper', less: null, gives: null, range, ...more,
})

const step = (key: string, repeat: Node | null = null): Lesson['parts'][number]['steps'][number] => ({
  key, title: [{ t: 'text', v: `Step ${key}` }], range, repeat, say: null, when: null, stop: null, oneAct: false, heat: false, usual: null, needs: null, instead: null,
  safety: [], holds: [], text: [], pictures: [], drawings: [], checks: [], readings: [], photos: [], waits: [], faults: [], why: [], feel: [],
})

/** A small lesson of two steps with one size, told as 4.4 mm across. */
export function lesson(more: Partial<Lesson> = {}): Lesson {
  return {
    format: 1, title: 'Wrapped-loop link', craft: 'wire', piece: 'one link', covers: '', notFor: '', atStake: '', needs: [], permissions: [], torch: null,
    time: { maker: 3, first: 25, later: 8 }, keeps: 182, expected: null, objectMayMirror: true, tools: [], materials: [],
    sizes: [
      { name: 'across', ask: 'Loop, outside', unit: 'mm', usual: 4.4, from: 3, to: 6, step: null, choices: [], range },
      { name: 'joins', ask: 'What it joins', unit: 'choice', usual: 'nothing', from: null, to: null, step: null, choices: ['nothing', 'the link before'], range },
    ],
    figures: [], readings: [reading('first')], criteria: [], closing: [], opening: [], faults: [],
    parts: [{ key: 'link', title: [{ t: 'text', v: 'The link' }], range, repeat: null, say: null, order: 'each', when: null, stop: null, text: [], steps: [step('cut'), step('turns', { k: 'num', v: 2 })] }],
    ...more,
  }
}

export const start = (more: Partial<PieceStarted> = {}): PieceStarted => ({
  lesson: '01HZZZZZZZZZZZZZZZZZZZZZZ0', revision: '01HZZZZZZZZZZZZZZZZZZZZZZ1', compiled: 'a'.repeat(64), engine: 1,
  sizes: { across: { value: '4.4', typed: '4.4' }, joins: { value: 'nothing', typed: 'nothing' } }, figures: {}, plan: 'b'.repeat(64), material: 'copper', practice: true, goods: null, left: false, level: 2,
  once: { passed: [], samples: {} }, ...more,
})

export const taken = (named: string, values: readonly number[], more: Partial<TakenReading> = {}): TakenReading =>
  ({ id: `${named}${values.join()}`, round: 'r', turn: 'cut', reading: named, values: values.map(String), typed: values.map(String), unit: 'mm', gauge: '', right: true, at: '2026-03-01T10:00:00.000Z', ...more })

export function outOf(one: Lesson, begun: PieceStarted = start()): SetOut {
  const set = setOut(one, begun)
  if (!set) throw new Error('The lesson has no plan.')
  return set
}
export const state = (more: Partial<State> = {}): State => ({ ...emptyState('p'), status: 'finished', start: start(), ...more })
