/** The people, classes and levels of the demo studio. All invented. */
import type { AgeBand, Ground, Hand, Role } from '../../../shared/schemas/lists'

export const STUDIO = { slug: 'tallow-yard', name: 'Tallow Yard Bench School', zone: 'Europe/London' } as const
/** Shown when the demo starts; the demo exists on loopback only. */
export const DEMO_PASSWORD = 'third hand bench'
export const emailOf = (key: string): string => `${key}@tallow-yard.example`

export const LESSON_ORDER = ['bench-safety', 'jump-rings', 'wrapped-loop-link', 'coiled-bead-cap', 'hand-knotted-strand'] as const
export type LessonSlug = (typeof LESSON_ORDER)[number]

export interface DemoPerson { key: string, name: string, roles: Role[], hand?: Hand, textSize?: number, ground?: Ground, ageBand?: AgeBand, guardian?: string }

export const STAFF: DemoPerson[] = [
  { key: 'owen', name: 'Owen Tait', roles: ['manager'] },
  { key: 'ruth', name: 'Ruth Calder', roles: ['instructor'] },
  { key: 'imran', name: 'Imran Sethi', roles: ['instructor'] },
  { key: 'dilys', name: 'Dilys Pugh', roles: ['instructor'] },
  { key: 'marian', name: 'Marian Voss', roles: ['assessor'] },
]
/** Levels the manager founds before the first lesson: who may teach what. */
export const FOUNDED: { key: string, lessons: Partial<Record<LessonSlug, 4 | 5>> }[] = [
  { key: 'ruth', lessons: { 'bench-safety': 5, 'jump-rings': 5, 'wrapped-loop-link': 5, 'coiled-bead-cap': 5, 'hand-knotted-strand': 4 } },
  { key: 'imran', lessons: { 'bench-safety': 5, 'jump-rings': 5, 'wrapped-loop-link': 4 } },
  { key: 'dilys', lessons: { 'bench-safety': 5, 'jump-rings': 5, 'wrapped-loop-link': 5, 'coiled-bead-cap': 5, 'hand-knotted-strand': 5 } },
]

export interface Apprentice extends DemoPerson {
  /** Levels in the order of LESSON_ORDER. */
  levels: [number, number, number, number, number]
  /** Minutes a piece takes, as a factor on the lesson's time for a learner. */
  pace: number
}
const apprentice = (key: string, name: string, pace: number, levels: Apprentice['levels'], more: Partial<DemoPerson> = {}): Apprentice =>
  ({ key, name, pace, levels, roles: ['apprentice'], ...more })

export const CLASS_A: Apprentice[] = [
  apprentice('amy', 'Amy Brandt', 0.7, [4, 4, 4, 4, 4]),
  apprentice('ben', 'Ben Okoro', 0.9, [4, 4, 4, 3, 2], { hand: 'left' }),
  apprentice('carla', 'Carla Nunes', 0.9, [4, 4, 4, 2, 4]),
  apprentice('dev', 'Dev Rana', 1.2, [4, 4, 3, 2, 1]),
  apprentice('ellie', 'Ellie Marsh', 1.0, [4, 4, 4, 2, 3], { ground: 'peach' }),
  apprentice('farid', 'Farid Haddad', 0.8, [4, 4, 4, 3, 2]),
  apprentice('grace', 'Grace Lowe', 1.0, [4, 4, 4, 2, 4]),
]
export const CLASS_B: Apprentice[] = [
  apprentice('hana', 'Hana Sato', 1.1, [4, 4, 3, 2, 1], { hand: 'left' }),
  apprentice('isaac', 'Isaac Bell', 1.1, [4, 3, 2, 1, 0]),
  apprentice('jola', 'Jola Wrona', 1.0, [4, 4, 3, 2, 3]),
  apprentice('kit', 'Kit Farrow', 1.2, [4, 3, 2, 0, 2], { ageBand: '16-17' }),
  apprentice('leila', 'Leila Aziz', 1.0, [4, 4, 3, 1, 2]),
  apprentice('marcus', 'Marcus Dunn', 1.5, [4, 3, 2, 0, 2], { textSize: 200 }),
]

export const CLASSES = [
  { key: 'a', name: 'Tuesday evening', weekday: 2, hour: 18, people: CLASS_A, teacher: 'ruth' },
  { key: 'b', name: 'Saturday morning', weekday: 6, hour: 10, people: CLASS_B, teacher: 'imran' },
] as const
