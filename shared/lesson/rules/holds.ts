/** A HOLD opens its step: only safety notes stand above it, and several need a `when` each. */
import type { Rule } from './context'

const DEEDS = /\b(cut|solder|glue|close|trim|file|drill|set|pull down)\b/i
const SAFETY = new Set(['DANGER', 'WARNING', 'CAUTION', 'NOTICE'])

export const holds: Rule = ({ sighted, add }) => {
  for (const { step, items } of sighted.steps) {
    let above: { deed: boolean, at: { from: number, to: number } } | null = null
    for (const item of items) {
      if (item.t === 'block' && SAFETY.has(item.keyword)) continue
      if (item.t === 'text' && item.lines.every(line => line.text.trim() === '')) continue
      if (item.t === 'block' && item.keyword === 'HOLD') {
        if (above) add(above.deed ? 'hold-after-deed' : 'hold-not-first', item.at, above.deed ? 'The deed stands above the hold that guards it. Move the hold to the head of the step.' : 'A HOLD opens its step: only safety notes stand above it.')
        continue
      }
      above ??= { deed: false, at: item.at }
      if (item.t === 'text' && item.lines.some(line => DEEDS.test(line.text))) above.deed = true
    }
    if (step.holds.length > 1) for (const hold of step.holds.filter(one => one.when === null)) add('holds-without-when', hold.range, 'Several holds open this step: each needs a when, so that it is plain which is asked.')
  }
}
