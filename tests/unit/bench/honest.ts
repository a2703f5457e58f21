/** An honest tablet: it keeps what the server told it and what it has not sent, and does only what its own machine allows. */
import { type AnyEvent, type BenchEvent, decimal } from '../../../shared/bench/events'
import { add, askOf, begin, fold, type Folded, may, missing, placeIndex, type Verdict } from '../../../shared/bench/machine'
import type { Lesson } from '../../../shared/lesson/schema'
import { hand, type Hand, id, say } from './bench-lesson'

export class Server {
  readonly events: AnyEvent[] = []
  readonly folded: Folded
  readonly refused: { event: BenchEvent, verdict: Verdict }[] = []
  private readonly ids = new Set<string>()

  constructor(readonly lesson: Lesson, readonly piece: string) {
    this.folded = begin(piece)
  }

  take(event: BenchEvent): void {
    if (this.ids.has(event.id)) return
    const verdict = add(this.lesson, this.folded, event, { instructor: true })
    if (!verdict.ok) { this.refused.push({ event, verdict }); return }
    this.ids.add(event.id)
    this.events.push({ ...event, n: this.events.length + 1, late: verdict.late })
  }
}

export class Tablet {
  readonly hand: Hand
  pulled: AnyEvent[] = []
  unsent: BenchEvent[] = []

  constructor(readonly lesson: Lesson, piece: string, maker: string) {
    this.hand = hand(piece, maker)
  }

  view(): Folded {
    return fold(this.lesson, this.hand.piece, [...this.pulled, ...this.unsent])
  }

  pull(server: Server): void {
    this.pulled = [...server.events]
    this.unsent = this.unsent.filter(event => !server.events.some(one => one.id === event.id))
  }

  send(server: Server, count: number): void {
    for (const event of this.unsent.splice(0, count)) {
      server.take(event)
      this.pulled = this.pulled.some(one => one.id === event.id) ? this.pulled : [...this.pulled, ...server.events.filter(one => one.id === event.id)]
    }
  }

  /** Tries what comes into its head; keeps it only if its own machine takes it with effect. */
  try(event: BenchEvent): boolean {
    const { state, set } = this.view()
    const verdict = may(set, state, event)
    if (!verdict.ok || verdict.late) { this.hand.seq--; return false }
    this.unsent.push(event)
    return true
  }

  /** One act, picked by number: mostly what the step in hand asks for, sometimes something else. */
  act(pick: number): void {
    const { state, set } = this.view()
    if (!set || state.status !== 'at-bench') return
    this.hand.round = state.round
    const at = placeIndex(set, state)
    const turn = set.turns[at]
    const done = set.turns[pick % Math.max(1, at)]
    if (pick % 23 === 0 && done && at > 0) { this.try(say(this.hand, 'turn.remade', { turn: done.address, why: 'gap' })); return }
    if (pick % 41 === 0) { this.try(say(this.hand, 'piece.put-away', { why: 'stopped', words: null })); return }
    if (pick % 7 === 0) { this.try(say(this.hand, 'look.asked', { turn: turn?.address ?? null, about: 'stuck' })); return }
    if (!turn) { this.end(); return }
    const asked = turn.asks.findIndex((_, i) => !state.right[`${turn.address}#${i}`])
    if (asked >= 0) { this.answer(asked, pick); return }
    switch (missing(set, state, turn)) {
      case 'reading-missing': this.try(say(this.hand, 'reading.taken', { turn: turn.address, reading: 'across', values: [decimal(4 + (pick % 9) / 10)], typed: ['4'], unit: 'mm', gauge: '' })); return
      case 'photo-missing': this.photo('step', turn.address); return
      case 'check-missing': this.try(say(this.hand, 'check.answered', { turn: turn.address, check: turn.checks.find(i => !state.checked[`${turn.address}#${i}`]) ?? 0, choice: pick % 2 ? 'right' : 'wrong' })); return
      default: this.try(say(this.hand, 'step.done', { turn: turn.address, early: false }))
    }
  }

  private end(): void {
    const { state } = this.view()
    if (!state.closing.includes('tools-back')) { this.try(say(this.hand, 'closing.cleared', { item: 'tools-back' })); return }
    this.try(say(this.hand, 'piece.finished', {}))
  }

  private photo(why: 'step' | 'hold', turn: string): string {
    const photo = id()
    this.try(say(this.hand, 'photo.taken', { photo, turn, for: why, sha256: 'a'.repeat(64), bytes: 1000, type: 'image/jpeg', width: 10, height: 10 }))
    return photo
  }

  private answer(ask: number, pick: number): void {
    const { state, set } = this.view()
    const turn = set?.turns[set ? placeIndex(set, state) : 0]
    const asked = set && turn ? askOf(set, turn, ask) : null
    if (!turn || !asked) return
    const answer = asked.kind === 'choices' ? { choice: pick % 3 ? 'right' : 'wrong' }
      : asked.kind === 'count' ? { count: pick % 3 ? '3' : '4', typed: '' }
        : asked.kind === 'measure' ? { values: [pick % 3 ? '4.5' : '6'], typed: ['4.5'], unit: 'mm', gauge: '' }
          : { photo: this.photo('hold', turn.address) }
    this.try(say(this.hand, 'hold.answered', { turn: turn.address, ask, answer }))
  }
}
