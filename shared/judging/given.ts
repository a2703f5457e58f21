/** The marks a judge gave, checked against the lines of the piece. */
import type { Outcome, Says, Seen } from '../schemas/lists'
import type { EvidenceLine } from './evidence'
import { againOf, isInside, type Line } from './marks'

/** What was said of one line: a word for a judged line, a number in the base unit for a measured one. */
export interface Given {
  says?: Says
  /** Decimal text, in the reading's base unit. */
  value?: string
  /** By "the rest are yes". */
  rest?: true
}
export type Marks = Readonly<Record<string, Given>>

/** Can a line be marked at all by one who saw this much? A line that is seen live is not judged from the bag. */
export const canMark = (line: Pick<Line, 'live'>, seen: Seen | null): boolean => !line.live || seen === 'whole' || seen === 'holds'

/** A measured value as it was typed, with a comma or a point, or null when it is no such number. */
export function readMeasure(typed: string): number | null {
  const text = typed.trim().replace(',', '.')
  return /^\d{1,6}(\.\d{1,4})?$/.test(text) ? Number(text) : null
}

export interface MarkFault { key: string, says: string }

/** What is wrong with marks: about a line the piece has not, of the wrong kind, or said of the rest where it may not be. */
export function wrongMarks(lines: readonly Line[], marks: Marks, seen: Seen): MarkFault[] {
  const byKey = new Map(lines.map(line => [line.key, line]))
  return Object.entries(marks).flatMap(([key, given]): MarkFault[] => {
    const line = byKey.get(key)
    if (!line) return [{ key, says: 'This piece has no such line.' }]
    if (line.by === 'judge' ? given.says === undefined || given.value !== undefined : given.says !== undefined || given.value === undefined) return [{ key, says: `“${line.says}” is ${line.by === 'judge' ? 'judged with no, nearly or yes' : 'measured, not judged'}.` }]
    if (given.value !== undefined && readMeasure(given.value) === null) return [{ key, says: `“${line.says}”: type the measure as a number, like 4.4.` }]
    if (!canMark(line, seen)) return [{ key, says: `“${line.says}” is seen live or not at all.` }]
    if (given.rest && (line.essential || given.says !== 'yes')) return [{ key, says: 'Essential lines are marked one by one.' }]
    return []
  })
}

/** What is still to be marked: every essential line that can be; and, for a piece that is kept, the measure asked for again. */
export function missingMarks(lines: readonly Line[], marks: Marks, seen: Seen, outcome: Outcome, head: string): MarkFault[] {
  const again = outcome === 'kept' && seen !== 'photo' ? againOf(lines, head) : null
  return lines.flatMap((line): MarkFault[] => {
    const given = marks[line.key]
    if (line.key === again && !given) return [{ key: line.key, says: `Measure again: “${line.says}”.` }]
    if (!line.essential || given || !canMark(line, seen)) return []
    if (line.by === 'judge') return [{ key: line.key, says: `Not marked yet: “${line.says}”.` }]
    return outcome === 'kept' && line.takes.length === 0 ? [{ key: line.key, says: `Not measured yet: “${line.says}”.` }] : []
  })
}

/** The lines with what was said of them, as the gates read them. A measure taken again by the judge stands for the maker's. */
export function evidenceLines(lines: readonly Line[], marks: Marks): EvidenceLine[] {
  return lines.map((line) => {
    const given = marks[line.key]
    const value = given?.value === undefined ? null : readMeasure(given.value)
    const inside = value === null ? line.inside : line.inside.map((_, level) => isInside(line, value, level) ?? true)
    return { key: line.key, says: line.says, essential: line.essential, live: line.live, by: line.by, said: given?.says ?? null, inside }
  })
}

/** Lines that are no, or outside at a level: a sign-off at 4 or more over one of these says why. */
export function outsideLines(lines: readonly EvidenceLine[], level: number): EvidenceLine[] {
  return lines.filter(line => line.by === 'judge' ? line.said === 'no' : line.inside[level] === false)
}
