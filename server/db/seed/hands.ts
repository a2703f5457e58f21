/** A pair of hands for the demo: goes through a lesson as a tablet would, event by event, through the same service. */
import { ulid } from 'ulid'
import type { z } from 'zod'
import { limitsOf } from '../../../shared/bench/answers'
import { type Answer, type BenchEvent, type Bodies, decimal, EVENT_VERSION, type EventKind, type MeasuredSchema, type PieceStarted } from '../../../shared/bench/events'
import { add, askOf, begin, type Folded, holdPassed, newestSamples, scopeAt, type Turn } from '../../../shared/bench/machine'
import { stepOf } from '../../../shared/bench/set-out'
import { beginWith, toldOf } from '../../../shared/bench/sizes'
import { countOf } from '../../../shared/lesson/figures'
import type { Inline, Lesson, Reading } from '../../../shared/lesson/schema'
import type { Db } from '../client'
import { inTransaction } from '../transaction'
import type { Actor } from '../../services/actor'
import type { Files } from '../../services/files'
import { storedEvents } from '../../services/ledger'
import { actOnPiece } from '../../services/piece-acts'
import { keepPhoto } from '../../services/photos'
import { takeIn } from '../../services/pieces'
import type { MadePhoto, Subject } from './photographs'

export interface Bench { db: Db, files: Files, photos: MadePhoto[], random: () => number }
export interface Job {
  who: Actor
  lesson: Lesson
  revision: { id: string, lessonId: string, compiledSha: string }
  at: Date
  level: number
  left: boolean
  pace: number
  practice: boolean
  /** Who looks at the holds that want a witness. */
  witness: Actor
  /** Sizes other than the usual ones. */
  sizes?: Record<string, number | string | boolean>
  /** Stops at this step; else the piece is finished. */
  until?: string
  /** What the photos of this lesson show. */
  subject: Subject
  /** Steps at whose hold one wrong answer is given first. */
  misses?: string[]
  /** Added to a reading, in its unit: a fault of the hand. */
  off?: Record<string, number>
}
type Measured = z.infer<typeof MeasuredSchema>
export interface MadePiece { id: string, end: Date, finished: boolean }

/** Makes a piece. Returns its id and when the last act was. */
export async function makePiece(bench: Bench, job: Job): Promise<MadePiece> {
  const hands = new Hands(bench, job)
  await hands.begin()
  while (!hands.isThere()) await hands.turn()
  if (!job.until) await hands.finish()
  await hands.send()
  return { id: hands.piece, end: new Date(hands.clock), finished: !job.until }
}

class Hands {
  readonly piece: string
  clock: number
  private readonly tablet: string
  private readonly folded: Folded
  private readonly unsent: BenchEvent[] = []
  private seq = 0
  private round = ''
  private readonly shots: { id: string, photo: MadePhoto }[] = []
  private readonly missed = new Set<string>()

  constructor(private readonly bench: Bench, private readonly job: Job) {
    this.clock = job.at.getTime()
    this.piece = ulid(this.clock)
    this.tablet = ulid(this.clock)
    this.folded = begin(this.piece)
  }

  private get set() {
    if (!this.folded.set) throw new Error('The piece has not begun.')
    return this.folded.set
  }

  isThere(): boolean {
    const { place } = this.folded.state
    return place === null || (this.job.until !== undefined && place.split('@')[0] === this.job.until)
  }

  private say<K extends EventKind>(kind: K, body: Bodies[K], seconds: number): void {
    this.clock += Math.round(seconds * 1000)
    const id = ulid(this.clock)
    if (kind === 'piece.started') this.round = id
    const event = {
      id, piece: this.piece, round: this.round, tablet: this.tablet, seq: ++this.seq, actor: this.job.who.personId, kind, v: EVENT_VERSION, at: new Date(this.clock).toISOString(),
      since: this.seq === 1 ? null : Math.round(seconds * 1000), body,
      // The body is of the kind beside it, which the union cannot follow.
    } as unknown as BenchEvent
    const verdict = add(this.job.lesson, this.folded, event)
    if (!verdict.ok) throw new Error(`${this.job.lesson.title}: ${kind} was refused: ${verdict.says}`)
    this.unsent.push(event)
  }

  async begin(): Promise<void> {
    const { job } = this
    this.say('piece.started', startOf(job), 1)
    this.say('sitting.opened', { place: null, alike: 'first', way: 'steps', version: 'demo' }, 20)
  }

  /** One turn from its hold to done. */
  async turn(): Promise<void> {
    const turn = this.set.turns[this.set.at.get(this.folded.state.place ?? '') ?? -1]
    if (!turn) return
    const step = stepOf(this.set, turn)
    for (const [i] of turn.asks.entries()) await this.answer(turn, i)
    if (turn.witness && !holdPassed(this.folded.state, turn)) await this.witness(turn)
    for (const i of turn.checks) this.say('check.answered', { turn: turn.address, check: i, choice: step.checks[i]?.choices.find(choice => choice.right)?.key ?? '' }, 12)
    for (const i of turn.readings) {
      const name = step.readings[i]?.reading ?? ''
      const measured = this.measure(turn, name)
      this.say('reading.taken', { turn: turn.address, reading: name, ...measured }, 25)
    }
    for (const i of turn.photos) this.photo('step', turn.address, step.photos[i]?.prompt ?? [])
    for (const i of turn.waits) {
      this.say('wait.started', { turn: turn.address, wait: i, until: new Date(this.clock + 12 * 3600_000).toISOString() }, 5)
      this.clock += 12 * 3600_000
    }
    this.say('step.done', { turn: turn.address, early: false }, this.secondsOf(turn))
  }

  private secondsOf(turn: Turn): number {
    const { later } = this.job.lesson.time
    const each = later * 60 / Math.max(1, this.set.turns.length)
    return Math.max(4, each * this.job.pace * (0.7 + 0.6 * this.bench.random()) * (turn.asks.length > 0 ? 0.7 : 1))
  }

  private async answer(turn: Turn, index: number): Promise<void> {
    const ask = askOf(this.set, turn, index)
    if (!ask) return
    const wrongFirst = this.job.misses?.includes(turn.step) && !this.missed.has(turn.step)
    if (wrongFirst && ask.kind === 'choices') {
      this.missed.add(turn.step)
      this.say('hold.answered', { turn: turn.address, ask: index, answer: { choice: ask.choices.find(choice => !choice.right)?.key ?? '' } }, 15)
    }
    let answer: Answer
    if (ask.kind === 'choices') answer = { choice: ask.choices.find(choice => choice.right)?.key ?? '' }
    else if (ask.kind === 'count') { const count = countOf(ask.is, scopeAt(this.set, turn)); answer = { count: decimal(count), typed: String(count) } }
    else if (ask.kind === 'measure') answer = this.measure(turn, ask.reading, true)
    else answer = { photo: this.photo('hold', turn.address, ask.prompt) }
    this.say('hold.answered', { turn: turn.address, ask: index, answer }, 14)
  }

  private measure(turn: Turn, name: string, mustBeRight = false): Measured {
    const reading = this.job.lesson.readings.find(one => one.name === name)
    if (!reading) throw new Error(`No reading ${name}`)
    const limits = limitsOf(this.job.lesson, reading, scopeAt(this.set, turn), this.job.level, newestSamples(this.set, this.folded.state))
    const off = mustBeRight ? 0 : this.job.off?.[name] ?? 0
    // One hand measures one thing twice and reads the same.
    const value = valueNear(reading, limits, off, this.bench.random())
    const values = Array.from({ length: reading.times }, () => value)
    return { values: values.map(one => decimal(one)), typed: values.map(one => String(one)), unit: reading.unit, gauge: reading.with ?? '' }
  }

  private photo(why: 'step' | 'hold' | 'finished', turn: string | null, prompt: Inline[]): string {
    const asked = JSON.stringify(prompt)
    const of = /10x|hole/.test(asked) ? 'hole' : /board/.test(asked) ? 'board' : this.job.subject
    const fit = this.bench.photos.filter(photo => photo.of === of)
    const shot = fit[Math.floor(this.bench.random() * fit.length)]
    if (!shot) throw new Error('The demo has no photographs.')
    const id = ulid(this.clock)
    this.say('photo.taken', { photo: id, turn, for: why, sha256: shot.sha, bytes: shot.bytes.length, type: 'image/jpeg', width: shot.width, height: shot.height }, 18)
    this.shots.push({ id, photo: shot })
    return id
  }

  private async witness(turn: Turn): Promise<void> {
    await this.send()
    this.clock += 40_000
    const act = { pieceId: this.piece, tablet: ulid(this.clock), id: ulid(this.clock), kind: 'hold.witnessed', body: { turn: turn.address, how: 'there' } } as const
    await inTransaction(this.bench.db, tx => actOnPiece(tx, this.job.witness, act, new Date(this.clock)))
    for (const event of await storedEvents(this.bench.db, this.job.who.studioId, this.piece)) {
      if (event.id === act.id) add(this.job.lesson, this.folded, event)
    }
  }

  async finish(): Promise<void> {
    for (const item of this.job.lesson.closing) this.say('closing.cleared', { item: item.key }, 5)
    this.say('piece.finished', {}, 4)
  }

  /** Sends what is unsent, then the photos. Anything refused is a fault of the demo. */
  async send(): Promise<void> {
    while (this.unsent.length > 0) {
      const events = this.unsent.splice(0, 100)
      const out = await takeIn(this.bench.db, this.job.who, this.piece, { tablet: this.tablet, sentAt: new Date(this.clock).toISOString(), events }, new Date(this.clock))
      if (out.refused) throw new Error(`${this.job.lesson.title}: ${out.refused.reason}: ${out.refused.says}`)
    }
    for (const { id, photo } of this.shots.splice(0)) await keepPhoto(this.bench.db, this.bench.files, this.job.who, id, photo.bytes)
  }
}

/** What a piece begins with: the usual sizes, or those told. */
export function startOf(job: Pick<Job, 'lesson' | 'revision' | 'level' | 'left' | 'practice' | 'sizes'>): PieceStarted {
  const { lesson, revision } = job
  const sizes = Object.fromEntries(lesson.sizes.map(size => [size.name, toldOf(size, job.sizes?.[size.name] ?? size.usual)]))
  const begun = beginWith({ lesson, ids: { lesson: revision.lessonId, revision: revision.id, compiled: revision.compiledSha }, sizes, practice: job.practice, left: job.left, level: job.level, once: { passed: [], samples: {} } })
  if (!begun.ok) throw new Error(`${lesson.title}: ${begun.says}`)
  return begun.start
}

/** A value a hand would measure: near the middle, on the gauge's own steps, inside the limits unless pushed off. */
function valueNear(reading: Reading, limits: ReturnType<typeof limitsOf>, off: number, draw: number): number {
  const step = reading.step ?? 0.1
  const middle = limits?.is ?? 10
  const half = limits ? (limits.high - limits.low) / 2 : 0
  const room = Math.min(half, limits?.agree ?? half)
  const value = Math.round((middle + off + (draw - 0.5) * room * 0.6) / step) * step
  const held = off === 0 && limits ? Math.min(Math.floor(limits.high / step + 1e-6) * step, Math.max(Math.ceil(limits.low / step - 1e-6) * step, value)) : value
  return Number(Math.max(0, held).toFixed(6))
}
