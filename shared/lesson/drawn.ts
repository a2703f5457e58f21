/** A lesson's drawing with its figures put in. */
import { drawCoil, type Drawn, drawLoop, drawStrip } from '../trade/drawing'
import { evaluate } from './figures'
import type { Drawing } from './schema'
import { type LengthUnits, shownLength, shownValue } from './shown'
import type { Scope } from './values'

/** Kinds that can be worked out today; of the others the lesson's picture is shown. */
export const DRAWN_KINDS: readonly Drawing['kind'][] = ['strip', 'loop', 'coil']

/** The drawing at these figures, or null: of a kind not drawn yet, or of figures that have no value. */
export function drawn(drawing: Drawing, scope: Scope, units: LengthUnits, left: boolean): Drawn | null {
  const all = (name: string): number[] => (drawing.args[name] ?? []).flatMap((node) => {
    const result = evaluate(node, scope)
    return result.ok && typeof result.value.value === 'number' ? [result.value.value] : []
  })
  const one = (name: string): number => all(name)[0] ?? Number.NaN
  const show = (mm: number): string => Number.isFinite(mm) ? shownLength(mm, units) : ''
  switch (drawing.kind) {
    case 'strip': {
      if (all('marks').length !== (drawing.args.marks ?? []).length) return null
      return drawStrip({ length: one('length'), marks: all('marks') }, { length: show(one('length')), marks: all('marks').map(show) })
    }
    case 'loop':
      return drawLoop({ inside: one('inside'), wire: one('wire'), neck: one('neck'), bead: one('bead') }, { inside: show(one('inside')), neck: `neck ${show(one('neck'))}`, jaw: 'jaw', bead: 'bead' }, left)
    case 'coil': {
      const turns = shownValue({ kind: 'number', value: one('turns') })
      return drawCoil({ turns: one('turns'), core: one('core'), wire: one('wire') }, { turns: `${turns} ${turns === '1' ? 'turn' : 'turns'}`, core: '', length: show(one('turns') * one('wire')) }, left)
    }
    default: return null
  }
}
