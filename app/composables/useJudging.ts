import { ulid } from 'ulid'
import { type Draft, draftGates, isOpen, lookedAt, mayRest, newDraft, stillMissing, withFault, withMark, withMeasure, withOutcome, withRest, withSeen } from '#shared/judging/draft'
import type { Gate } from '#shared/judging/gates'
import type { MarkFault } from '#shared/judging/given'
import type { SignedLevel } from '#shared/judging/levels'
import type { Line } from '#shared/judging/marks'
import type { JudgementBody } from '#shared/schemas/judging'
import type { Outcome, Says, Seen } from '#shared/schemas/lists'
import type { FaultChoice, LookView } from '#shared/types/judging'

export interface Judging {
  /** What is said so far; kept on this device until the piece is judged. */
  draft: Ref<Draft>
  gates: ComputedRef<Gate[]>
  /** What is missing before it can be judged, in sentences. */
  missing: ComputedRef<MarkFault[]>
  looked: ComputedRef<{ done: number, all: number }>
  /** Level whose tolerance the measures are shown against. */
  levelShown: ComputedRef<number>
  canRest: ComputedRef<boolean>
  isOpen: (line: Line) => boolean
  mark: (key: string, says: Says) => void
  measure: (key: string, typed: string) => void
  rest: () => void
  see: (seen: Seen) => void
  become: (outcome: Outcome) => void
  give: (level: SignedLevel | null) => void
  point: (fault: FaultChoice) => void
  /** What is sent, or null while something is missing. */
  body: () => JudgementBody | null
  forget: () => void
}

/** One judgement being made on one piece. Everything it decides is worked out by the same rules as on the server. */
export function useJudging(view: Ref<LookView>): Judging {
  const { value: draft, forget } = useKept<Draft>(() => `judging:${view.value.piece.id}`, () => newDraft(ulid()))
  const set = (next: Draft) => { draft.value = next }
  const gates = computed(() => draftGates(draft.value, view.value.lines, view.value.facts, view.value.bare))
  const missing = computed(() => stillMissing(draft.value, view.value.lines, view.value.piece.head, view.value.awaited, gates.value))
  return {
    draft, gates, missing,
    looked: computed(() => lookedAt(draft.value, view.value.lines, view.value.again)),
    levelShown: computed(() => draft.value.level ?? 3),
    canRest: computed(() => mayRest(draft.value, view.value.lines)),
    isOpen: line => isOpen(line, draft.value.seen),
    mark: (key, says) => set(withMark(draft.value, key, says)),
    measure: (key, typed) => set(withMeasure(draft.value, key, typed)),
    rest: () => set(withRest(draft.value, view.value.lines)),
    see: seen => set(withSeen(draft.value, view.value.lines, seen)),
    become: outcome => set(withOutcome(draft.value, outcome)),
    give: level => set({ ...draft.value, level }),
    point: fault => set(withFault(draft.value, fault)),
    body() {
      const { id, seen, outcome, level, marks, faults, words, remake, inHand } = draft.value
      if (missing.value.length > 0 || seen === null || outcome === null || level === undefined) return null
      const { n, head, id: piece } = view.value.piece
      return { id, piece, n, head, seen, outcome, level, marks, faults, words, remake, inHand }
    },
    forget,
  }
}
