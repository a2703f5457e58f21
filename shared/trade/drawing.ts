/**
 * Drawings worked out from figures: where each line, circle and dimension of a drawing stands. Lengths come in mm and
 * leave in units of the drawing (640 wide). Numbers never mirror: `left` turns the shapes over and lets the text stand.
 */
export type Shape =
  | { t: 'line', role: 'wire' | 'core' | 'tick', d: string, width: number }
  | { t: 'circle', role: 'bead' | 'jaw', x: number, y: number, r: number }
  | { t: 'text', role: 'name', x: number, y: number, says: string }
  /** A dimension line from one point to another, with its figure. */
  | { t: 'dimension', from: [number, number], to: [number, number], at: [number, number], anchor: 'start' | 'middle' | 'end', says: string, main: boolean }
export interface Drawn { width: number, height: number, shapes: Shape[] }

const WIDTH = 640
const MARGIN = 40
const MOST_MARKS = 8
const good = (...values: number[]): boolean => values.every(value => Number.isFinite(value) && value > 0 && value < 1e5)
const places = (...values: (number | string)[]): string => values.map(value => typeof value === 'number' ? Number(value.toFixed(2)) : value).join(' ')

export interface StripFigures { length: number, marks: readonly number[] }
export interface StripSays { length: string, marks: readonly string[] }

/** A wire on the rule: its length, and each mark measured from the same end. Null when it cannot be drawn. */
export function drawStrip({ length, marks }: StripFigures, says: StripSays): Drawn | null {
  if (!good(length) || marks.length > MOST_MARKS || marks.some(mark => !Number.isFinite(mark) || mark < 0 || mark > length * (1 + 1e-9))) return null
  const y = 96
  const at = (mm: number): number => MARGIN + mm / length * (WIDTH - 2 * MARGIN)
  const shapes: Shape[] = [
    { t: 'line', role: 'wire', d: places('M', at(0), y, 'H', at(length)), width: 9 },
    { t: 'dimension', from: [at(0), 56], to: [at(length), 56], at: [WIDTH / 2, 42], anchor: 'middle', says: says.length, main: true },
  ]
  const inOrder = marks.map((mm, i) => ({ mm, says: says.marks[i] ?? '' })).sort((a, b) => a.mm - b.mm)
  // Ticks first: a figure stands over the ticks of the rows below.
  inOrder.forEach(({ mm }, i) => shapes.push({ t: 'line', role: 'tick', d: places('M', at(mm), y - 16, 'V', y + 54 + i * 44), width: 2 }))
  inOrder.forEach(({ mm, says: figure }, i) => {
    const row = y + 44 + i * 44
    // To the right of its end there is room, but where the wire ends or the tick of a longer mark comes down.
    const isRoomy = at(mm) < WIDTH - 170 && !inOrder.some(other => other.mm > mm && at(other.mm) < at(mm) + 130)
    shapes.push({ t: 'dimension', from: [at(0), row], to: [at(mm), row], at: isRoomy ? [at(mm) + 14, row + 10] : [at(mm) - 14, row - 8], anchor: isRoomy ? 'start' : 'end', says: figure, main: false })
  })
  return { width: WIDTH, height: y + 44 + Math.max(1, inOrder.length) * 44, shapes }
}

export interface LoopFigures { inside: number, wire: number, neck: number, bead: number }
export interface LoopSays { inside: string, neck: string, jaw: string, bead: string }

/** A loop over the jaw, its neck, and the bead beneath; all at one scale. Null when it cannot be drawn. */
export function drawLoop({ inside, wire, neck, bead }: LoopFigures, says: LoopSays, left = false): Drawn | null {
  if (!good(inside, wire, bead) || !Number.isFinite(neck) || neck < 0) return null
  const height = 440
  const scale = Math.min(30, 190 / (inside + 2 * wire), 250 / (inside + 2 * wire + neck))
  const thick = wire * scale
  const jaw = inside * scale
  const round = (jaw + thick) / 2
  // The neck's figure stands beside the loop: it gets the room.
  const middle = WIDTH / 2 + (left ? 40 : -40)
  const beadTop = 340
  const beadRadius = bead / 2 * scale
  const centre = beadTop - neck * scale - thick / 2 - round
  const side = left ? -1 : 1
  const x = (offset: number): number => middle + side * offset
  const sweep = left ? 1 : 0
  const path = places('M', x(0), beadTop + 8, 'V', centre + round + 6, 'Q', x(0), centre + round, x(7), centre + round - 1,
    'A', round, round, 0, 0, sweep, x(round), centre, 'A', round, round, 0, 0, sweep, x(-round), centre, 'V', centre + jaw / 2)
  return {
    width: WIDTH, height,
    shapes: [
      { t: 'circle', role: 'bead', x: middle, y: beadTop + beadRadius, r: beadRadius },
      { t: 'line', role: 'wire', d: path, width: thick },
      { t: 'circle', role: 'jaw', x: middle, y: centre, r: jaw / 2 },
      { t: 'text', role: 'name', x: middle, y: centre + 8, says: says.jaw },
      { t: 'text', role: 'name', x: middle, y: Math.min(height - 16, beadTop + Math.min(64, beadRadius + 10)), says: says.bead },
      { t: 'dimension', from: [middle - jaw / 2, centre - round - 34], to: [middle + jaw / 2, centre - round - 34], at: [middle, centre - round - 52], anchor: 'middle', says: says.inside, main: true },
      { t: 'dimension', from: [x(round + 50), beadTop - neck * scale], to: [x(round + 50), beadTop], at: [x(round + 68), beadTop - neck * scale / 2 + 9], anchor: left ? 'end' : 'start', says: says.neck, main: false },
    ],
  }
}

export interface CoilFigures { turns: number, core: number, wire: number }
export interface CoilSays { turns: string, core: string, length: string }

/** Turns wound on a core, seen from the side, each touching the last. Null when it cannot be drawn. */
export function drawCoil({ turns, core, wire }: CoilFigures, says: CoilSays, left = false): Drawn | null {
  if (!good(turns, core, wire) || turns > 60) return null
  const drawn = Math.ceil(turns)
  const scale = Math.min(46, 400 / (drawn * wire), 150 / (core + 2 * wire))
  const thick = wire * scale
  const width = drawn * thick
  const height = 360
  const y = 180
  const start = (WIDTH - width) / 2
  const reach = (core + wire) / 2 * scale
  const lean = thick * (left ? -0.22 : 0.22)
  const shapes: Shape[] = [{ t: 'line', role: 'core', d: places('M', MARGIN, y, 'H', WIDTH - MARGIN), width: core * scale }]
  for (let turn = 0; turn < drawn; turn++) {
    const x = start + (turn + 0.5) * thick
    // The last turn of 2.5 is half a turn: it is seen on one side of the core only.
    const low = turn + 1 > turns ? 0 : reach
    shapes.push({ t: 'line', role: 'wire', d: places('M', x + lean, y - reach, 'L', x - lean * (low / reach), y + low), width: thick * 0.94 })
  }
  const rim = reach + thick / 2
  shapes.push(
    { t: 'dimension', from: [start, y - rim - 36], to: [start + width, y - rim - 36], at: [WIDTH / 2, y - rim - 54], anchor: 'middle', says: says.turns, main: true },
    { t: 'dimension', from: [start, y + rim + 40], to: [start + turns * thick, y + rim + 40], at: [WIDTH / 2, y + rim + 76], anchor: 'middle', says: says.length, main: false },
    { t: 'text', role: 'name', x: MARGIN + (start - MARGIN) / 2, y: y + core * scale / 2 + 34, says: says.core },
  )
  return { width: WIDTH, height, shapes }
}
