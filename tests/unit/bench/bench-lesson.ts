/** Small lessons and tablets for the tests of the machine, made by hand so that they do not lean on the compiler. */
import { monotonicFactory } from 'ulid'
import type { AnyEvent, BenchEvent, Bodies, EventKind, PieceStarted } from '../../../shared/bench/events'
import { decimal, EVENT_VERSION } from '../../../shared/bench/events'
import { planSha, setOut } from '../../../shared/bench/machine'
import { shaOf } from '../../../shared/lesson/canonical'
import { FIGURE_ENGINE, type Ask, type Choice, type Hold, type Lesson, type Node, type Part, type Step } from '../../../shared/lesson/schema'

const range = { from: 0, to: 0, line: 1 }
const text = (v: string) => [{ t: 'text' as const, v }]
export const num = (v: number): Node => ({ k: 'num', v })
export const mm = (v: number): Node => ({ k: 'num', v, unit: 'mm' })
export const name = (n: string): Node => ({ k: 'name', n })

const choice = (key: string, right: boolean): Choice => ({ key, says: text(key), right, fault: right ? null : text(`${key} is wrong`), range })
export const choices: Ask = { kind: 'choices', question: [], choices: [choice('right', true), choice('wrong', false), choice('other', false)], fixed: false }
export const count = (n: number): Ask => ({ kind: 'count', is: num(n), question: text('How many?') })
export const measure: Ask = { kind: 'measure', reading: 'across' }
export const photoAsk: Ask = { kind: 'photo', prompt: text('The bead') }
export const hold = (asks: Ask[], more: Partial<Hold> = {}): Hold => ({ consequence: text('It is cut'), text: [], asks, wrong: null, witness: null, once: 'piece', when: null, range, ...more })

export function step(key: string, more: Partial<Step> = {}): Step {
  return {
    key, title: text(key), range, repeat: null, say: null, when: null, stop: null, oneAct: false, heat: false, usual: null, needs: null, instead: null, safety: [], holds: [], text: [],
    pictures: [], drawings: [], checks: [], readings: [], photos: [], waits: [], faults: [], why: [], feel: [], ...more,
  }
}
export const withCheck = { checks: [{ question: [], choices: choices.kind === 'choices' ? choices.choices : [], fixed: false, when: null, range }] }
export const withReading = { readings: [{ reading: 'across', text: [], when: null, range }] }
export const withPhoto = { photos: [{ prompt: text('Look'), when: null, range }] }
export const part = (key: string, steps: Step[], more: Partial<Part> = {}): Part => ({ key, title: text(key), range, repeat: null, say: null, order: 'each', when: null, stop: null, text: [], steps, ...more })

export function lesson(parts: Part[], more: Partial<Lesson> = {}): Lesson {
  return {
    format: 1, title: 'A link', craft: 'wire', piece: 'one link', covers: '', notFor: '', atStake: '', needs: [], permissions: [], torch: null, time: { maker: 3, first: 20, later: 8 }, keeps: 183,
    expected: null, objectMayMirror: true, tools: [], materials: [],
    sizes: [{ name: 'links', ask: 'Links', unit: 'count', usual: 2, from: 1, to: 5, step: null, choices: [], range }], figures: [],
    readings: [{ name: 'across', ask: 'Across', unit: 'mm', is: mm(4.4), sampleOf: null, within: mm(0.2), atLevels: [{ level: 2, within: mm(0.3) }], step: 0.1, times: 1, agree: null, with: 'Calliper', less: null, gives: null, range }],
    criteria: [{ key: 'bead', by: 'judge', says: 'Bead unmarked', reading: null, how: '10x', essential: true, live: false, when: null, within: null, atLevels: [], pictures: {}, range }],
    closing: [{ key: 'tools-back', says: 'Tools back' }], opening: [], faults: [{ key: 'tight', sees: text('Tight'), because: text('short'), do: text('remake'), when: null, range }], parts, ...more,
  }
}

export const makeUlid = monotonicFactory()
export const AT = Date.UTC(2026, 0, 5, 18, 0, 0)
export const id = (): string => makeUlid(AT)

export function start(of: Lesson, more: Partial<PieceStarted> = {}): PieceStarted {
  const body: PieceStarted = {
    lesson: id(), revision: id(), compiled: shaOf(of), engine: FIGURE_ENGINE, sizes: { links: { value: decimal(2), typed: '2' } }, figures: {}, plan: '0'.repeat(64), material: 'copper', practice: true,
    goods: null, left: false, level: 0, once: { passed: [], samples: {} }, ...more,
  }
  const set = setOut(of, body)
  return { ...body, plan: set ? planSha(set.turns) : body.plan }
}

export interface Hand { piece: string, tablet: string, actor: string, round: string, seq: number, clock: number }
export function hand(piece: string, actor: string): Hand {
  return { piece, tablet: id(), actor, round: '', seq: 0, clock: AT }
}

/** The next event of one hand, as a tablet would make it. */
export function say<K extends EventKind>(hand: Hand, kind: K, body: Bodies[K], own?: string): BenchEvent {
  hand.clock += 1000
  const event = own ?? id()
  const made = { id: event, piece: hand.piece, round: kind === 'piece.started' ? event : hand.round, tablet: hand.tablet, seq: ++hand.seq, actor: hand.actor, kind, v: EVENT_VERSION, at: new Date(hand.clock).toISOString(), since: 1000, body }
  return made as unknown as BenchEvent
}

export const numbered = (events: readonly BenchEvent[]): AnyEvent[] => events.map((event, i) => ({ ...event, n: i + 1 }))
