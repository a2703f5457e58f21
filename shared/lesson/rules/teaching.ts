/** Advice a substitute would thank for: how they know it is right, a picture or a measure, practice before a dear metal, tools listed. */
import { plainText } from '../text'
import { type Rule, textsOf } from './context'
import type { Lesson, Step } from '../schema'

const TOOLS = ['round-nose', 'chain-nose', 'flush cutter', 'calliper', 'loupe', 'saw frame', 'mandrel', 'needle file', 'reamer', 'tweezers', 'scissors', 'stocking', 'feeler', 'torch', 'pickle', 'mallet', 'cup bur', 'balance']
const DEAR = ['fine silver', 'sterling silver', 'pure gold', '18 ct yellow gold', '9 ct yellow gold', 'platinum']

const isMeasured = (step: Step): boolean => step.readings.length > 0 || step.photos.length > 0 || step.holds.length > 0 || step.checks.length > 0
const hasFigure = (step: Step): boolean => JSON.stringify([step.text, step.title]).includes('"t":"figure"')

export const teaching: Rule = ({ lesson, add }) => {
  for (const part of lesson.parts) {
    if (part.key === 'before') continue
    for (const step of part.steps) {
      if (step.pictures.length === 0 && step.drawings.length === 0 && !isMeasured(step) && !hasFigure(step)) add('no-picture-no-measure', step.range, 'This step has no picture and no measure. A picture from behind the hands teaches best.')
      if (!isMeasured(step) && step.feel.length === 0 && step.pictures.length === 0 && step.drawings.length === 0 && step.waits.length === 0) add('no-way-to-know', step.range, 'How would they know it is right? Give a measure, a picture of right, a check, or what the hand feels.')
    }
  }
  const dear = lesson.sizes.find(size => size.unit === 'metal' && (size.choices.length === 0 || size.choices.some(choice => DEAR.includes(choice))))
  if (dear && !JSON.stringify([lesson.parts, lesson.sizes]).match(/practice|copper|brass/)) add('no-practice', dear.range, 'Silver or gold is cut here with no practice before it. Where do they try it in copper?')
  tools(lesson, add)
}

function tools(lesson: Lesson, add: Parameters<Rule>[0]['add']): void {
  const listed = [...lesson.tools, ...lesson.materials.map(material => material.name)].join(' ').toLowerCase()
  const told = new Set<string>()
  for (const step of lesson.parts.flatMap(part => part.steps)) {
    const text = textsOf(step).filter(one => one.what === 'text').map(one => plainText(one.text)).join(' ').toLowerCase()
    for (const tool of TOOLS) {
      if (told.has(tool) || !text.includes(tool) || listed.includes(tool)) continue
      told.add(tool)
      add('tool-not-listed', step.range, `${tool} is used here and is not in the list of tools.`)
    }
  }
}
