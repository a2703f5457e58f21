/**
 * Wire and jaws as the bench sees them: looking square on to the plane of the loop, tools coming at the work end on.
 * Everything is to scale: `w` is one wire thickness on the sheet.
 */
import { BRASS, STEEL, GARNET } from './parts.mjs'

const LIT = '#dcb35f'
const n = value => Number(value.toFixed(1))
const path = points => points.map(([x, y], i) => `${i ? 'L' : 'M'}${n(x)} ${n(y)}`).join('')

/** A wire with its two edges drawn, so that one is seen to pass before another. */
export const rope = (d, w = 20, cap = 'round') => `<path d="${d}" fill="none" stroke="${BRASS}" stroke-width="${w}" stroke-linecap="${cap}" stroke-linejoin="round"/><path d="${d}" fill="none" stroke="${LIT}" stroke-width="${w - 5}" stroke-linecap="${cap}" stroke-linejoin="round"/>`
const patch = (d, w) => `<path d="${d}" fill="none" stroke="${LIT}" stroke-width="${w - 5}"/>`
/** Where the wire was, or would be. */
export const ghost = (d, width = 3) => `<path d="${d}" fill="none" stroke="${STEEL}" stroke-width="${width}" stroke-dasharray="10 9"/>`
/** The one line that shows what the eye checks. */
export const sight = d => `<path d="${d}" fill="none" stroke="${GARNET}" stroke-width="3"/>`

/** Loop of 3.0 in 0.7 wire: its middle line is this many wires from its centre. */
export const ROUND = 2.64
/** The work: bend at (x, y); the loop stands out from it to the left (-1) or the right (1), its open side up. */
export const work = (x, y, dir, w = 20) => ({ x, y, dir, w, r: ROUND * w })
/** A place on the work: `a` outward along the wire from the bend, `b` up, both in wires. */
export const place = (f, a, b) => [f.x + f.dir * a * f.w, f.y - b * f.w]
const along = (f, from, to) => {
  const parts = Math.max(1, Math.ceil(Math.abs(to - from) / 4))
  return Array.from({ length: parts + 1 }, (_, i) => {
    const at = (from + (to - from) * i / parts) * Math.PI / 180
    return place(f, ROUND - ROUND * Math.cos(at), ROUND * Math.sin(at))
  })
}
/** A stretch of the loop, to be drawn again over what passes behind it. */
export const arcOf = (f, from, to) => path(along(f, from, to))
/** Neck, square bend and the loop rolled so far; `tail` is the straight end left, in wires. */
export const rolled = (f, neck, degrees, tail) => {
  const at = degrees * Math.PI / 180
  const [a, b] = [ROUND - ROUND * Math.cos(at), ROUND * Math.sin(at)]
  return rope(path([place(f, -neck, 0), place(f, 0, 0), ...along(f, 0, degrees), place(f, a + tail * Math.sin(at), b + tail * Math.cos(at))]), f.w)
}
/** Square bend only: the end stands up from the neck. */
export const bent = (f, neck, tail) => rope(path([place(f, -neck, 0), place(f, 0, 0), place(f, 0, tail)]), f.w)
/** Whole loop, the wire passing before the neck and on for `tail` wires. */
export const closed = (f, neck, tail = 1) => {
  const back = path([place(f, -neck, 0), place(f, 0, 0), ...along(f, 0, 322)])
  const over = path([...along(f, 322, 342), place(f, -0.35, -0.1), place(f, -0.85, 1), place(f, -0.85, Math.max(tail, 1.01))])
  return rope(back, f.w) + rope(over, f.w) + patch(path(along(f, 308, 336)), f.w)
}
/** Front of the turns that follow the crossing: each `[place, place]` in wires down the neck; the last may run on as a tail. */
export const wound = (f, places, tail = 0) => places.map((at, i) => {
  const isLast = i === places.length - 1
  return rope(path([place(f, -at + 0.42, -1), place(f, -at, 1), ...isLast && tail > 1 ? [place(f, -at, tail)] : []]), f.w)
}).join('')
/** Two and a half turns, closed up: the crossing and the two that follow. */
export const PLACES = [1.87, 2.89]

/** Outline round all points. */
const hull = (points) => {
  const sorted = [...points].sort((p, q) => p[0] - q[0] || p[1] - q[1])
  const half = list => list.reduce((out, p) => {
    while (out.length > 1 && (out.at(-1)[0] - out.at(-2)[0]) * (p[1] - out.at(-2)[1]) - (out.at(-1)[1] - out.at(-2)[1]) * (p[0] - out.at(-2)[0]) <= 0) out.pop()
    return [...out, p]
  }, [])
  return [...half(sorted).slice(0, -1), ...half(sorted.reverse()).slice(0, -1)]
}
const face = (points, fill) => `<path d="${path(points)}Z" fill="${fill}" stroke="${STEEL}" stroke-width="2.5" stroke-linejoin="round"/>`
const disc = (x, y, r) => Array.from({ length: 36 }, (_, i) => [x + r * Math.cos(i * Math.PI / 18), y + r * Math.sin(i * Math.PI / 18)])
const grown = (points, by, [dx, dy]) => {
  const [cx, cy] = [points.reduce((s, p) => s + p[0], 0) / points.length, points.reduce((s, p) => s + p[1], 0) / points.length]
  return points.map(([x, y]) => [cx + (x - cx) * by + dx, cy + (y - cy) * by + dy])
}
/** Joint and handles far behind the work, at (x, y), going on in the direction `[dx, dy]`. */
const behind = (x, y, [dx, dy]) => {
  const long = Math.hypot(dx, dy)
  const [ux, uy] = [dx / long, dy / long]
  const handle = side => path([[x - uy * 10 * side, y + ux * 10 * side], [x + ux * 90 - uy * 34 * side, y + uy * 90 + ux * 34 * side], [x + ux * 400 - uy * 40 * side, y + uy * 400 + ux * 40 * side]])
  return [1, -1].map(side => `<path d="${handle(side)}" fill="none" stroke="${STEEL}" stroke-width="22" stroke-linejoin="round"/><path d="${handle(side)}" fill="none" stroke="#b9c3c8" stroke-width="17" stroke-linejoin="round"/>`).join('') + `<circle cx="${n(x)}" cy="${n(y)}" r="30" fill="#dfe3e4" stroke="${STEEL}" stroke-width="2.5"/><circle cx="${n(x)}" cy="${n(y)}" r="8" fill="${STEEL}"/>`
}
/** Pliers that come at the work from behind: `jaws` are the tips' end faces. Gives what lies behind the wire and what before it. */
export const pliers = (jaws, away, { grow = 1.3, tip = '#f2f5f5', body = '#c9d1d4' } = {}) => {
  const all = jaws.flat()
  const [mx, my] = [all.reduce((s, p) => s + p[0], 0) / all.length, all.reduce((s, p) => s + p[1], 0) / all.length]
  const joint = [mx + away[0], my + away[1]]
  const bodies = jaws.map((jaw) => {
    const [cx, cy] = [jaw.reduce((s, p) => s + p[0], 0) / jaw.length, jaw.reduce((s, p) => s + p[1], 0) / jaw.length]
    return face(hull([...jaw, ...grown(jaw, grow, [(joint[0] - cx) * 0.86, (joint[1] - cy) * 0.86])]), body)
  })
  return { back: behind(...joint, away) + bodies.join(''), front: jaws.map(jaw => face(jaw, tip)).join('') }
}
/** Ends of two round jaws, two flat jaws above and below the wire, and two cutting edges. */
export const roundJaw = (x, y, r) => disc(x, y, r)
export const flatJaw = (x, y, wide, high, up) => [[x - wide / 2, y], [x + wide / 2, y], [x + wide * 0.36, y - up * high], [x - wide * 0.36, y - up * high]]
/** A blade whose edge is at (x, y): `flat` is the direction of its flat face, `side` that of its body. */
export const blade = (x, y, [fx, fy], [sx, sy], long = 60) => [[x, y], [x + sx * long, y + sy * long], [x + sx * long - fx * long * 0.62, y + sy * long - fy * long * 0.62], [x + sx * long * 0.42 - fx * long * 0.5, y + sy * long * 0.42 - fy * long * 0.5]]
/** Jaws laid flat over a loop: one is seen, tip at (0, 0), lying to the left. */
export const flatOver = () => `<path d="M-190 0H-700" stroke="${STEEL}" stroke-width="46" fill="none"/><path d="M-190 0H-700" stroke="#b9c3c8" stroke-width="41" fill="none"/>${face([[0, -20], [0, 20], [-150, 38], [-230, 38], [-230, -38], [-150, -38]], '#dfe3e4')}`
