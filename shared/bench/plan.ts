/** The list of turns of one piece: fixed by the lesson and by what was told before the piece began. */
import type { Ask, Lesson, Node, Part, Step } from '../lesson/schema'
import { countOf, isTrue, type Scope } from '../lesson/figures'
import { shaOf } from '../lesson/canonical'
import type { PieceStarted } from './events'
import { scopeOf } from './scope'

export const MOST_TURNS = 2000

export interface PlannedAsk {
  /** Index of the hold in its step, and of the ask in that hold. */
  hold: number
  ask: number
}

/** One step to be done once. Members that are lists of numbers are indices into the step's own lists. */
export interface Turn {
  address: string
  part: string
  step: string
  partTurn: number
  partTurns: number
  stepTurn: number
  stepTurns: number
  /** What `turn` and `last` mean in it: the nearest repeat. */
  turn: number
  last: number
  asks: PlannedAsk[]
  witness: boolean
  safety: number[]
  checks: number[]
  readings: number[]
  photos: number[]
  waits: number[]
  faults: number[]
  drawings: number[]
  why: number[]
  feel: number[]
}

export type Planned = { ok: true, turns: Turn[] } | { ok: false, says: string }

/** All turns of a piece. Refused (with a sentence) when there are none or more than 2,000. */
export function plan(lesson: Lesson, start: PieceStarted): Planned {
  const scope = scopeOf(lesson, start)
  const seen = new Set<string>()
  const turns: Turn[] = []
  for (const part of lesson.parts) {
    // The briefing is asked before level 1 only.
    if (part.key === 'before' && start.level >= 1) continue
    if (!holds(part.when, scope)) continue
    const all = times(part.repeat, scope)
    for (const [partTurn, step] of inOrder(part, all)) {
      const outer = part.repeat ? { turn: partTurn, last: all } : null
      for (const turn of turnsOf(step, partTurn, all, part, scope, outer, start, seen)) turns.push(turn)
      if (turns.length > MOST_TURNS) return { ok: false, says: `This would be more than ${MOST_TURNS} steps. Make it in smaller sets.` }
    }
  }
  return turns.length > 0 ? { ok: true, turns } : { ok: false, says: 'With these sizes no step is left to do. Change the sizes.' }
}

export const planSha = (turns: readonly Turn[]): string => shaOf(turns)

/** Link by link, or (order: step) every first step, then every second one. */
function inOrder(part: Part, all: number): [number, Step][] {
  const count = Array.from({ length: all }, (_, i) => i + 1)
  return part.order === 'step'
    ? part.steps.flatMap(step => count.map(turn => [turn, step] satisfies [number, Step]))
    : count.flatMap(turn => part.steps.map(step => [turn, step] satisfies [number, Step]))
}

function turnsOf(step: Step, partTurn: number, partTurns: number, part: Part, base: Scope, outer: { turn: number, last: number } | null, start: PieceStarted, seen: Set<string>): Turn[] {
  const stepTurns = times(step.repeat, outer ? withTurn(base, outer.turn, outer.last) : base)
  const turns: Turn[] = []
  for (let stepTurn = 1; stepTurn <= stepTurns; stepTurn++) {
    const near = step.repeat ? { turn: stepTurn, last: stepTurns } : outer
    const scope = near ? withTurn(base, near.turn, near.last) : base
    if (!holds(step.when, scope)) continue
    turns.push({
      address: addressOf(step, part, partTurn, stepTurn), part: part.key, step: step.key, partTurn, partTurns, stepTurn, stepTurns,
      turn: near?.turn ?? 1, last: near?.last ?? 1,
      ...asksOf(step, scope, start, seen),
      safety: those(step.safety, scope), checks: those(step.checks, scope), readings: those(step.readings, scope), photos: those(step.photos, scope),
      waits: those(step.waits, scope), faults: those(step.faults, scope), drawings: those(step.drawings, scope), why: those(step.why, scope), feel: those(step.feel, scope),
    })
  }
  return turns
}

function addressOf(step: Step, part: Part, partTurn: number, stepTurn: number): string {
  if (step.repeat) return `${step.key}@${partTurn}.${stepTurn}`
  return part.repeat ? `${step.key}@${partTurn}` : step.key
}

/** The questions of a step's holds that are asked in this turn, and whether an instructor must look. */
function asksOf(step: Step, scope: Scope, start: PieceStarted, seen: Set<string>): Pick<Turn, 'asks' | 'witness'> {
  const asks: PlannedAsk[] = []
  let witness = false
  // A hold of the stick or the class evening is asked once: not again in this piece, and not if it was passed before.
  const isPast = seen.has(step.key) || start.once.passed.includes(step.key)
  step.holds.forEach((hold, h) => {
    if (!holds(hold.when, scope)) return
    if (hold.once !== 'piece') {
      if (isPast) return
      seen.add(step.key)
    }
    hold.asks.forEach((_: Ask, a) => asks.push({ hold: h, ask: a }))
    witness ||= hold.witness === 'always' || (hold.witness === 'below 3' && start.level < 3) || (hold.witness === 'below 4' && start.level < 4)
  })
  return { asks, witness }
}

const holds = (when: Node | null, scope: Scope): boolean => when === null || isTrue(when, scope)
const times = (repeat: Node | null, scope: Scope): number => repeat === null ? 1 : Math.min(countOf(repeat, scope), MOST_TURNS + 1)
const those = (list: readonly { when: Node | null }[], scope: Scope): number[] => list.flatMap((item, i) => holds(item.when, scope) ? [i] : [])

function withTurn(scope: Scope, turn: number, last: number): Scope {
  return { ...scope, turn: { kind: 'count', value: turn }, last: { kind: 'count', value: last } }
}
