import type { Sighted } from '../body'
import type { Code, Findings, Place } from '../findings'
import type { Kinds } from '../kinds'
import type { Block, Inline, Kind, Lesson, Step } from '../schema'

export interface CompileOptions {
  /** Names of the pictures beside the lesson; null: not known, so none is missed. */
  pictures?: ReadonlySet<string> | null
  /** Slugs of the studio's lessons; null: not known. */
  lessons?: ReadonlySet<string> | null
  /** The revision in use before this one. */
  previous?: Lesson | null
}

/** What a rule may look at. Rules add findings and change nothing else but the kinds of figures. */
export interface Context { source: string, lesson: Lesson, sighted: Sighted, findings: Findings, kinds: Kinds & Map<string, Kind | null>, options: CompileOptions, add: (code: Code, at: Place, message: string, mend?: Parameters<Findings['add']>[3]) => void }
export type Rule = (context: Context) => void

/** All inline text of a step by what it is, for rules about words. */
export interface TextHere { text: readonly (Inline | Block)[], what: 'title' | 'text' | 'aside' | 'choice' | 'fault' | 'safety', at: Place }
export function textsOf(step: Step): TextHere[] {
  const at = step.range
  return [
    { text: step.title, what: 'title', at }, { text: step.text, what: 'text', at },
    ...step.safety.flatMap(note => [{ text: note.hazard, what: 'safety' as const, at: note.range }, { text: note.avoid, what: 'safety' as const, at: note.range }]),
    ...step.holds.flatMap(hold => [{ text: hold.consequence, what: 'aside' as const, at: hold.range }, { text: hold.text, what: 'aside' as const, at: hold.range }, { text: hold.wrong ?? [], what: 'fault' as const, at: hold.range },
      ...hold.asks.flatMap((ask): TextHere[] => ask.kind === 'choices' ? choiceTexts(ask, hold.range) : ask.kind === 'count' ? [{ text: ask.question, what: 'aside' as const, at: hold.range }] : ask.kind === 'photo' ? [{ text: ask.prompt, what: 'aside' as const, at: hold.range }] : [])]),
    ...step.checks.flatMap(check => choiceTexts(check, check.range)),
    ...step.faults.flatMap((fault): TextHere[] => [fault.sees, fault.because, fault.do].map(text => ({ text, what: 'fault' as const, at: fault.range }))),
    ...[...step.why, ...step.feel].map(aside => ({ text: aside.text, what: 'aside' as const, at: aside.range })),
    ...step.readings.map(reading => ({ text: reading.text, what: 'aside' as const, at: reading.range })), ...step.photos.map(photo => ({ text: photo.prompt, what: 'aside' as const, at: photo.range })),
    ...step.waits.map(wait => ({ text: wait.why ?? [], what: 'aside' as const, at: wait.range })), ...step.pictures.map(picture => ({ text: picture.alt, what: 'aside' as const, at: picture.range })),
    ...(step.instead ? [{ text: step.instead, what: 'aside' as const, at }] : []),
  ]
}

function choiceTexts(of: { question: readonly Block[], choices: readonly { says: Inline[], fault: Inline[] | null, range: Place }[] }, at: Place): TextHere[] {
  return [{ text: of.question, what: 'aside' as const, at }, ...of.choices.flatMap((choice): TextHere[] => [{ text: choice.says, what: 'choice' as const, at: choice.range }, { text: choice.fault ?? [], what: 'fault' as const, at: choice.range }])]
}
