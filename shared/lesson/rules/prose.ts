/** Advice on words: short sentences and choices, one act a step, working hand and holding hand. */
import { plainText } from '../text'
import { type Rule, textsOf } from './context'

const LONGEST_SENTENCE = 20
const LONGEST_CHOICE = 8
const words = (text: string): number => text.split(/\s+/).filter(Boolean).length

export const prose: Rule = ({ lesson, add }) => {
  for (const step of lesson.parts.flatMap(part => part.steps)) {
    for (const { text, what, at } of textsOf(step)) {
      const plain = plainText(text)
      const long = plain.split(/(?<=[.!?:;])\s+/).find(sentence => words(sentence) > LONGEST_SENTENCE)
      if (long) add('long-sentence', at, `A sentence of ${words(long)} words: “${long.slice(0, 50)}...” At the bench about 12 are read at a glance.`)
      if (what === 'choice' && words(plain) > LONGEST_CHOICE) add('long-choice', at, `A choice of ${words(plain)} words. Six or fewer are told apart at a glance.`)
      if (/\b(left|right)[- ]hand(ed)?\b|\bin (the|your) (left|right) hand\b/i.test(plain)) add('left-right', at, 'Say working hand and holding hand: one person in ten is left-handed.')
    }
    if (!step.oneAct && /\b(and then|then)\s+[a-z]+|;\s*then\b/i.test(plainText(step.text)) && words(plainText(step.text)) > 8) add('two-actions', step.range, 'Two actions in one step. Make two steps, or write one_act: yes if it is one continuous act.')
  }
}
