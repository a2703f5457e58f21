/** Words compared with a choice are among its choices: one letter off, and the hold or step behind the `when` is never shown. */
import { nearNames, orNear, type Place } from '../findings'
import { METAL_NAMES } from '../functions'
import type { Lesson, Node, Step } from '../schema'
import type { Rule } from './context'

interface Compared { name: string, word: string }

/** Each comparison of a name with text in an expression. */
function comparedIn(node: Node | null): Compared[] {
  if (!node) return []
  switch (node.k) {
    case 'cmp': {
      const [name, text] = node.a.k === 'name' ? [node.a, node.b] : [node.b, node.a]
      return name.k === 'name' && text.k === 'text' ? [{ name: name.n, word: text.v }] : []
    }
    case 'and': case 'or': return [...comparedIn(node.a), ...comparedIn(node.b)]
    case 'not': return comparedIn(node.a)
    default: return []
  }
}

interface Conditioned { when: Node | null, range: Place }
const inStep = (step: Step): Conditioned[] => [step, ...step.safety, ...step.holds, ...step.checks, ...step.readings, ...step.photos, ...step.waits, ...step.faults, ...step.drawings, ...step.why, ...step.feel]

/** Every yes/no expression of a lesson. */
function conditions(lesson: Lesson): Conditioned[] {
  return [
    ...lesson.figures.map(({ node, range }) => ({ when: node, range })), ...lesson.criteria, ...lesson.materials, ...lesson.faults,
    ...lesson.parts.flatMap(part => [part, ...part.steps.flatMap(inStep)]),
  ]
}

export const choiceWords: Rule = ({ lesson, add }) => {
  const words = new Map<string, readonly string[]>(lesson.sizes.flatMap((size): [string, readonly string[]][] => {
    if (size.unit === 'choice') return [[size.name, size.choices]]
    return size.unit === 'metal' ? [[size.name, size.choices.length > 0 ? size.choices : METAL_NAMES]] : []
  }))
  if (words.size === 0) return
  for (const { when, range } of conditions(lesson)) {
    for (const { name, word } of comparedIn(when)) {
      const known = words.get(name)
      if (known && !known.includes(word)) add('unknown-choice', range, `“${word}” is none of the choices of ${name}, so this is never so. There is ${known.join(', ')}.${orNear(nearNames(word, known))}`)
    }
  }
}
