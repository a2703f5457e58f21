/** When who made what in the demo: pieces in time order, with the level each was judged at. */
import { CLASS_A, CLASS_B, type Apprentice, CLASSES, LESSON_ORDER, type LessonSlug } from './people'

const DAY = 86_400_000

export interface PlannedPiece {
  person: Apprentice
  lesson: LessonSlug
  at: Date
  /** The level given on it; null: kept, and the level stays. */
  level: number | null
  /** With a second name some days later. */
  second: boolean
  seen: 'whole' | 'holds'
  outcome: 'kept' | 'sent-back' | 'waits' | 'at-bench'
  until?: string
  misses?: string[]
  off?: Record<string, number>
  faults?: string[]
  words?: string
  sizes?: Record<string, number | string | boolean>
  /** How the piece lies on the bench before it is judged: by whom it is judged other than the usual one. */
  judge?: string
}

/** The evening or morning of a class, so many weeks before this week's. */
function evening(now: Date, of: (typeof CLASSES)[number], weeksAgo: number, minutes = 0): Date {
  const day = new Date(now)
  const back = ((day.getUTCDay() + 6) % 7) + 1 - of.weekday
  const last = new Date(day.getTime() - (back > 0 ? back : back + 7) * DAY)
  last.setUTCHours(of.hour, 10 + minutes, 0, 0)
  return new Date(last.getTime() - weeksAgo * 7 * DAY)
}

/** In which week of the term before each lesson's first piece is made: what it needs comes first. */
const FIRST_WEEK: Record<LessonSlug, number> = { 'bench-safety': 0, 'jump-rings': 2, 'wrapped-loop-link': 4, 'hand-knotted-strand': 5, 'coiled-bead-cap': 7 }
/** Weeks ago the term before began, and this one. */
const TERM_BEFORE = 23
const THIS_TERM = 8

/** Pieces that carry a person from nothing to a level: one for 1 or 2, two for 3, three on three days for 4. */
function steps(level: number): (number | null)[] {
  return [[], [1], [2], [2, 3], [2, 3, 4]][level] ?? []
}

function usualPieces(now: Date, of: (typeof CLASSES)[number], person: Apprentice, began = TERM_BEFORE): PlannedPiece[] {
  return LESSON_ORDER.flatMap((lesson, i) => steps(person.levels[i] ?? 0).map((level, turn) => ({
    person, lesson, level, at: evening(now, of, began - FIRST_WEEK[lesson] - turn, i * 9 + turn), second: level === 4, seen: level === 4 ? 'whole' as const : 'holds' as const, outcome: 'kept' as const,
  })))
}

/** In the first weeks of this term everyone does bench safety again, and keeps rings and links alive. */
function againPieces(now: Date, of: (typeof CLASSES)[number], person: Apprentice, skip: LessonSlug[] = []): PlannedPiece[] {
  const weeks: Partial<Record<LessonSlug, number>> = { 'bench-safety': 0, 'jump-rings': 2, 'wrapped-loop-link': 4, 'hand-knotted-strand': 5 }
  return LESSON_ORDER.flatMap((lesson, i) => {
    const week = weeks[lesson]
    if (week === undefined || (person.levels[i] ?? 0) < 3 || skip.includes(lesson)) return []
    return [{ person, lesson, level: null, at: evening(now, of, THIS_TERM - week, 20 + i * 7), second: false, seen: 'holds' as const, outcome: 'kept' as const }]
  })
}

const who = (key: string): Apprentice => {
  const found = [...CLASS_A, ...CLASS_B].find(person => person.key === key)
  if (!found) throw new Error(`Nobody in the demo is called ${key}.`)
  return found
}

/** What is going on just now: bags that wait, pieces on the bench, one sent back. */
function threads(now: Date): PlannedPiece[] {
  const [a, b] = CLASSES
  const base = { level: null, second: false, seen: 'holds' as const }
  return [
    { ...base, person: who('dev'), lesson: 'wrapped-loop-link', at: new Date(now.getTime() - 5 * DAY - 2 * 3600_000), outcome: 'waits', misses: ['wrap-first'], off: { gap: 0.15 } },
    { ...base, person: who('leila'), lesson: 'wrapped-loop-link', at: evening(now, b, 0, 15), outcome: 'waits' },
    { ...base, person: who('ellie'), lesson: 'hand-knotted-strand', at: new Date(now.getTime() - 2 * DAY - 5 * 3600_000), outcome: 'waits' },
    { ...base, person: who('amy'), lesson: 'jump-rings', at: new Date(now.getTime() - DAY - 4 * 3600_000), outcome: 'waits' },
    { ...base, person: who('kit'), lesson: 'jump-rings', at: evening(now, b, 0, 35), outcome: 'waits' },
    { ...base, person: who('carla'), lesson: 'coiled-bead-cap', at: evening(now, a, 12, 0), outcome: 'sent-back', words: 'Both scrolls turn the same way. Bend both hooks before you coil either.' },
    { ...base, person: who('jola'), lesson: 'hand-knotted-strand', at: evening(now, b, 2, 20), outcome: 'sent-back', judge: 'dilys', words: 'Cord is seen beside two knots. Close the knot on the tip of the tweezers, touching the bead.' },
    { ...base, person: who('hana'), lesson: 'coiled-bead-cap', at: evening(now, b, 0, 25), outcome: 'at-bench', until: 'lay' },
    { ...base, person: who('ben'), lesson: 'hand-knotted-strand', at: evening(now, a, 0, 30), outcome: 'at-bench', until: 'thread' },
    { ...base, person: who('marcus'), lesson: 'wrapped-loop-link', at: evening(now, b, 4, 10), outcome: 'at-bench', until: 'turn-first' },
    { ...base, person: who('isaac'), lesson: 'wrapped-loop-link', at: evening(now, b, 1, 12), outcome: 'at-bench', until: 'wrap-second' },
  ]
}

/** Farid's links were last made so long ago that a refresh is due in nine days; Grace was away seven months. */
function late(now: Date, keeps: number): PlannedPiece[] {
  const [a] = CLASSES
  const last = new Date(now.getTime() - (keeps - 9) * DAY)
  const farid = usualPieces(now, a, who('farid'), 34).filter(piece => piece.lesson !== 'coiled-bead-cap' && piece.lesson !== 'hand-knotted-strand')
    .map((piece) => {
      const links = piece.lesson === 'wrapped-loop-link'
      return links ? { ...piece, at: new Date(last.getTime() - (4 - (piece.level ?? 4)) * 7 * DAY) } : piece
    })
  const grace = usualPieces(now, a, who('grace'), 42).filter(piece => piece.lesson !== 'coiled-bead-cap')
  const home = { person: who('grace'), lesson: 'hand-knotted-strand' as const, level: null, second: false, seen: 'holds' as const, outcome: 'kept' as const }
  return [
    ...farid, ...usualPieces(now, a, who('farid')).filter(piece => piece.lesson === 'coiled-bead-cap' || piece.lesson === 'hand-knotted-strand'),
    ...againPieces(now, a, who('farid'), ['wrapped-loop-link']),
    ...grace, { ...home, at: evening(now, a, 22, 40) }, { ...home, at: evening(now, a, 6, 40) },
    { person: who('grace'), lesson: 'bench-safety', level: 4, second: false, seen: 'whole', outcome: 'kept', at: evening(now, a, THIS_TERM, 20) },
    { person: who('grace'), lesson: 'coiled-bead-cap', level: 2, second: false, seen: 'holds', outcome: 'kept', at: evening(now, a, 3, 10) },
  ]
}

/** An instructor who gives second names keeps their own hand in, too: Ruth at strands, Imran at links. */
function staffPieces(now: Date): PlannedPiece[] {
  const hand = (key: string, name: string): Apprentice => ({ key, name, pace: 0.5, levels: [5, 5, 4, 0, 4], roles: ['instructor'] })
  const piece = (person: Apprentice, lesson: LessonSlug, daysAgo: number): PlannedPiece =>
    ({ person, lesson, level: null, second: false, seen: 'holds', outcome: 'kept', judge: 'dilys', at: new Date(now.getTime() - daysAgo * DAY) })
  return [260, 140, 30].flatMap(days => [piece(hand('ruth', 'Ruth Calder'), 'hand-knotted-strand', days), piece(hand('imran', 'Imran Sethi'), 'wrapped-loop-link', days + 3)])
}

/** Everything, in the order it happened. `keeps` is the life of a link's sign-off in days. */
export function demoPieces(now: Date, keeps: number): PlannedPiece[] {
  const others = CLASSES.flatMap(of => of.people.filter(person => person.key !== 'farid' && person.key !== 'grace').flatMap(person => [...usualPieces(now, of, person), ...againPieces(now, of, person)]))
  // Ben's links wait for their second name: they were signed only last week.
  const [a] = CLASSES
  const pieces = others.map(piece => piece.person.key === 'ben' && piece.lesson === 'wrapped-loop-link' && piece.level === 4 ? { ...piece, at: evening(now, a, 1, 30), second: false } : piece)
  return [...pieces, ...late(now, keeps), ...staffPieces(now), ...threads(now)].sort((x, y) => x.at.getTime() - y.at.getTime())
}
