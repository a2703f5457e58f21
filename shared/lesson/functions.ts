/** The functions a lesson may call: the kinds they take and give, and the formula. Adding one is adding one entry. */
import { METALS, wireMass } from '../trade/metal'
import { coil, ring } from '../trade/wire-forms'
import type { FunctionName, Kind } from './schema'
import type { Value } from './values'

/** `same`: every argument of one kind, and the result of that kind too. */
export type Signature = { takes: readonly Kind[], gives: Kind } | { same: true, least: number, most: number } | { root: true }
export interface FunctionEntry { signature: Signature, work: (args: readonly Value[]) => number | null }

const of = (args: readonly Value[], i: number): number => { const value = args[i]?.value; return typeof value === 'number' ? value : Number.NaN }
const nearest = (x: number, step: number): number => step > 0 ? Math.round(x / step) * step : Number.NaN
/** A hair below a whole number of steps is that number: doubles do not hold tenths. */
const HAIR = 1e-9

export const FUNCTION_TABLE: Partial<Record<FunctionName, FunctionEntry>> = {
  ring: { signature: { takes: ['length', 'length'], gives: 'length' }, work: args => ring(of(args, 0), of(args, 1)) },
  coil: { signature: { takes: ['number', 'length', 'length'], gives: 'length' }, work: args => coil(of(args, 0), of(args, 1), of(args, 2)) },
  wire_mass: { signature: { takes: ['metal', 'length', 'length'], gives: 'mass' }, work: args => typeof args[0]?.value === 'string' ? wireMass(args[0].value, of(args, 1), of(args, 2)) : null },
  sqrt: { signature: { root: true }, work: args => Math.sqrt(of(args, 0)) },
  min: { signature: { same: true, least: 1, most: 12 }, work: args => Math.min(...args.map((_, i) => of(args, i))) },
  max: { signature: { same: true, least: 1, most: 12 }, work: args => Math.max(...args.map((_, i) => of(args, i))) },
  nearest: { signature: { same: true, least: 2, most: 2 }, work: args => nearest(of(args, 0), of(args, 1)) },
  up: { signature: { same: true, least: 2, most: 2 }, work: args => of(args, 1) > 0 ? Math.ceil(of(args, 0) / of(args, 1) - HAIR) * of(args, 1) : Number.NaN },
  down: { signature: { same: true, least: 2, most: 2 }, work: args => of(args, 1) > 0 ? Math.floor(of(args, 0) / of(args, 1) + HAIR) * of(args, 1) : Number.NaN },
}

export const METAL_NAMES: readonly string[] = METALS.map(metal => metal.name)
