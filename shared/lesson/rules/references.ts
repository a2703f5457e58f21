/** Readings and figures that are named somewhere are there. */
import { nearNames, orNear } from '../findings'
import { withoutCode } from '../text'
import type { Context, Rule } from './context'

export const references: Rule = (context) => {
  const { lesson, add } = context
  const readings = lesson.readings.map(reading => reading.name)
  const known = (name: string | null, at: { from: number, to: number }) => {
    if (name !== null && !readings.includes(name)) add('unknown-reading', at, `There is no reading “${name}”.${orNear(nearNames(name, readings))}`)
  }
  for (const reading of lesson.readings) known(reading.sampleOf, reading.range)
  for (const criterion of lesson.criteria) known(criterion.reading, criterion.range)
  for (const part of lesson.parts) {
    for (const step of part.steps) {
      for (const here of step.readings) known(here.reading, here.range)
      for (const hold of step.holds) for (const ask of hold.asks) if (ask.kind === 'measure') { known(ask.reading, hold.range); canFail(context, ask.reading, hold.range) }
    }
  }
  figures(context)
}

/** A measure at a hold is held against something: with no middle or no tolerance any number would pass. */
function canFail({ lesson, add }: Context, name: string, at: { from: number, to: number }): void {
  const reading = lesson.readings.find(one => one.name === name)
  if (!reading) return
  const held = reading.sampleOf === null ? reading : lesson.readings.find(one => one.name === reading.sampleOf)
  if (held?.is && (reading.within || reading.atLevels.length > 0)) return
  add('hold-cannot-fail', at, `Any number passes this hold: the reading ${name} ${held?.is ? 'has no within' : 'does not say what it is to be'}. Give it is: and within:.`)
}

/** `{` before a letter is a size or figure, or `\{`. Not in code, links or front matter. */
function figures({ source, sighted, lesson, kinds, add }: Context): void {
  const names = new Set([...lesson.sizes.map(size => size.name), ...lesson.figures.map(figure => figure.name), 'clockwise', 'anticlockwise'])
  // A figure that could not be read has its own finding.
  for (const [name, kind] of kinds) if (kind === null) names.add(name)
  const bodyFrom = sighted.items[0]?.at.from ?? source.length
  const body = withoutCode(source.slice(bodyFrom)).replace(/\]\([^)\n]*\)/g, link => ' '.repeat(link.length))
  for (const match of body.matchAll(/(\\?)\{([A-Za-z][^}\n]{0,60})(\})?/g)) {
    if (match[1]) continue
    const at = { from: bodyFrom + match.index, to: bodyFrom + match.index + match[0].length }
    const name = /^([a-z][a-z0-9_]{0,30})(?: to \d+(?:\.\d+)?)?$/.exec(match[2] ?? '')?.[1]
    if (!name || !match[3]) add('unknown-figure', at, `“${match[0].slice(0, 40)}” is no figure. Write {name} or {name to 0.5}; a brace as text is \\{.`)
    else if (!names.has(name)) add('unknown-figure', at, `There is no size or figure “${name}”.${orNear(nearNames(name, [...names]))}`)
  }
}
