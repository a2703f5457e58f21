/** Pictures of the coiled bead cap. Bead of 12 mm, wire of 0.8 mm, drawn to scale: along the hole from the side, or tilted so that the cap is seen. */
import * as p from './parts.mjs'
import * as k from './wirework.mjs'

const R = 7.5               // half the bead, in wires
const HOLE = 9.5            // from the bead's middle to the bend of a loop: the first turn and the crossing lie between
const CAP = [3.25, 2.25, 1.25]
const n = value => Number(value.toFixed(1))
const path = points => points.map(([x, y], i) => `${i ? 'L' : 'M'}${n(x)} ${n(y)}`).join('')
const stands = radius => Math.sqrt((R + 0.5) ** 2 - radius ** 2)

/** A link seen from the side, its middle at (x, y): bead, both loops and both caps. */
const work = (x, y, dir, w) => k.work(x + dir * HOLE * w, y, dir, w)
const loops = (x, y, w, neck = 3) => [-1, 1].map(dir => k.closed(work(x, y, dir, w), neck)).join('')
const capSide = (x, y, dir, w) => CAP.map(radius => k.rope(`M${n(x + dir * (stands(radius) + 0.06) * w)} ${n(y - radius * w)}L${n(x + dir * (stands(radius) - 0.06) * w)} ${n(y + radius * w)}`, w)).join('')
const linkSide = (x, y, w) => loops(x, y, w) + p.bead(x, y, R * w) + capSide(x, y, -1, w) + capSide(x, y, 1, w)
/** Flat spiral whose outer end is at angle `out`, going out `turns`; `way` 1 is clockwise from the middle. */
const spiral = (x, y, turns, out, way, w, eye = 0.55) => Array.from({ length: Math.round(turns * 40) + 1 }, (_, i) => {
  const back = (turns - i / 40) * 2 * Math.PI
  const r = (eye + i / 40 * 1.02) * w
  return [x + r * Math.cos(out - way * back), y + r * Math.sin(out - way * back)]
})
/** End of a link of two scrolls: the leg from the cap to a scroll on the bead. */
const scrollSide = (x, y, dir, w) => {
  const [sx, sy] = [x + dir * 2.9 * w, y + 0.5 * w]
  const coil = spiral(sx, sy, 1.9, dir > 0 ? -0.5 : Math.PI + 0.5, dir > 0 ? -1 : 1, w)
  return k.rope(path([...coil, [x + dir * 6.6 * w, y + 2.6 * w]].slice(0, -1)) + `Q${n(x + dir * 5.9 * w)} ${n(y - 0.2 * w)} ${n(x + dir * stands(3.1) * w)} ${n(y - 2.2 * w)}`, w)
}
const linkScrolled = (x, y, w) => linkSide(x, y, w) + scrollSide(x, y, -1, w) + scrollSide(x, y, 1, w)

/** The same bead with its hole turned towards the eye. */
const TILT = 40 * Math.PI / 180
const seen = (x, y, w, radius, height, turn) => [x + radius * w * Math.cos(turn), y - height * w * Math.cos(TILT) + radius * w * Math.sin(turn) * Math.sin(TILT)]
const capTop = (x, y, w, from, to) => Array.from({ length: Math.round((to - from) * 40) + 1 }, (_, i) => {
  const turn = from + i / 40
  const radius = 0.9 + Math.max(0, turn)
  return seen(x, y, w, radius, stands(radius), Math.PI / 2 - turn * 2 * Math.PI)
})
const loopTop = (x, y, w) => {
  const [, foot] = seen(x, y, w, 0, stands(0) - 0.5, 0)
  const bend = foot - 2.3 * w * Math.cos(TILT)
  const r = k.ROUND * 0.9 * w
  return k.rope(`M${x} ${n(foot)}V${n(bend)}`, w) + k.rope(`M${x} ${n(bend)}A${r} ${n(r * Math.cos(TILT) + 2)} 0 1 0 ${x - 1} ${n(bend)}`, w)
}
const round = (x, y, r, rows) => {
  // Diamond facets: rows of corners about the hole, each row turned half a step against the next.
  const at = (row, i) => { const lat = rows[row] * Math.PI / 180; const turn = (i + row % 2 / 2) / 12 * 2 * Math.PI; return { to: seen(x, y, 1, r * Math.cos(lat), r * Math.sin(lat), turn), isNear: Math.sin(lat) * Math.sin(TILT) + Math.cos(lat) * Math.sin(turn) * Math.cos(TILT) > -0.02 } }
  return rows.flatMap((_, row) => row + 1 === rows.length ? [] : Array.from({ length: 12 }, (_, i) => i).flatMap(i => [[at(row, i), at(row + 1, row % 2 ? i + 1 : i)], [at(row, i), at(row + 1, row % 2 ? i : i - 1)]]))
    .filter(([a, b]) => a.isNear && b.isNear).map(([a, b]) => p.line(path([a.to, b.to]), 1.5, p.STEEL)).join('') + p.line(path(Array.from({ length: 13 }, (_, i) => at(0, i).to)), 1.5, p.STEEL)
}
/** Tape round the bead's middle, between two heights. */
const belt = (x, y, r, low, high) => {
  const arc = (h) => {
    const radius = Math.sqrt(r * r - h * h)
    const limb = Math.asin(Math.max(-1, Math.min(1, -h * Math.tan(TILT) / radius)))
    return Array.from({ length: 31 }, (_, i) => seen(x, y, 1, radius, h, limb + (Math.PI - 2 * limb) * i / 30))
  }
  const heights = Array.from({ length: 9 }, (_, i) => high + (low - high) * i / 8).map(arc)
  return `<path d="${path([...heights[0], ...heights.map(one => one[30]), ...[...heights[8]].reverse(), ...[...heights].reverse().map(one => one[0])])}Z" fill="#ead9a8" stroke="${p.BRASS}" stroke-width="2.5" stroke-linejoin="round"/>`
}

/** Close to one cap: the bead to the left, the end of the last turn standing clear of it. */
const C = { x: 40, y: 372, w: 34 }
const standsAt = C.x + stands(3.25) * C.w
const nearCap = high => k.closed(work(C.x, C.y, 1, C.w), 3) + p.bead(C.x, C.y, R * C.w) + k.rope(`M${n(standsAt)} ${C.y + 3.25 * C.w}V${n(C.y - high * C.w)}`, C.w) + CAP.slice(1).map(radius => k.rope(`M${n(C.x + stands(radius) * C.w)} ${n(C.y - radius * C.w)}V${n(C.y + radius * C.w)}`, C.w)).join('')
const cutAt = C.y - 5.75 * C.w

const small = (y, left) => [linkScrolled(190, y, 9), k.rope(`M380 ${y}H${380 + left}`, 9)]
const leg = (x, y, w, dir, long) => k.rope(`M${n(x + dir * stands(3.25) * w)} ${y}V${n(y - long * w)}`, w)
const hooked = (x, y, w, way) => k.rope(`M${x} ${y}V${y - 7 * w}A${1.3 * w} ${1.3 * w} 0 0 ${way > 0 ? 1 : 0} ${x + way * 2.6 * w} ${y - 7 * w}V${y - 6.6 * w}`, w)
/** Seen along the bead's side: the scroll edge on, its near end at `from` degrees off the hole, `off` wires off the bead. */
const onArc = (x, y, w, degrees, off = 0.5) => [x + (R + off) * w * Math.cos(degrees * Math.PI / 180), y - (R + off) * w * Math.sin(degrees * Math.PI / 180)]
const edge = (x, y, w, off = 0.5) => {
  const [nx, ny] = onArc(x, y, w, 36, off)
  const along = [-Math.sin(56 * Math.PI / 180) * 5.6 * w, -Math.cos(56 * Math.PI / 180) * 5.6 * w]
  return k.rope(`M${n(x + stands(3.25) * w)} ${n(y - 2.4 * w)}Q${n(x + stands(3.25) * w)} ${n(y - 3.9 * w)} ${n(nx)} ${n(ny)}L${n(nx + along[0])} ${n(ny + along[1])}`, w)
}
const profile = (x, y, w, off) => k.closed(work(x, y, 1, w), 3) + p.bead(x, y, R * w) + edge(x, y, w, off) + capSide(x, y, 1, w)

/** Paper between the bead and the scroll, its far end free. */
const slip = (() => { const [x, y] = onArc(200, 290, 20, 44, 0.2); return `<path d="M${n(x)} ${n(y)}l-198 -134" stroke="${p.STEEL}" stroke-width="10"/><path d="M${n(x)} ${n(y)}l-196 -132.600" stroke="#fff" stroke-width="6"/>` })()

const openLoop = k.work(150, 230, 1, 18)
const C2 = 150 + 2 * k.ROUND * 18 * 0.5 + 60
const overArc = Array.from({ length: 9 }, (_, i) => { const at = (110 + i * 4.5) * Math.PI / 180; return k.place(openLoop, k.ROUND - k.ROUND * Math.cos(at), k.ROUND * Math.sin(at)) })
const bur = (x, y, w) => p.steel(`M${x - 1.12 * w} ${y + 0.5 * w}Q${x - 1.12 * w} ${y - 1.2 * w} ${x - 0.4 * w} ${y - 1.6 * w}V${y - 3.6 * w}H${x + 0.4 * w}V${y - 1.6 * w}Q${x + 1.12 * w} ${y - 1.2 * w} ${x + 1.12 * w} ${y + 0.5 * w}Z`) + p.steel(`M${x - 0.75 * w} ${y - 3.4 * w}H${x + 0.75 * w}V-20H${x - 0.75 * w}Z`, '#e3cfa4')
const twist = (x, y) => p.arrow(`M${x + 60} ${y - 14}A64 22 0 1 1 ${x - 58} ${y - 8}`, [x - 62, y - 14], 235)
const longEnds = [1, -1].map(dir => k.closed(work(330, 270, dir, 18), 3, 9)).join('')

export const CAP_PICTURES = {
  'two-links': ['Two copper links, the wire left over beside each, a rule below', ...small(90, 180), ...small(240, 172), p.at(60, 350, 0, p.rule(540, 40))],
  'guard': ['Tape round the middle of a faceted bead, both shoulders bare', p.bead(330, 220, 180), round(330, 220, 180, [66, 40, 13, -13, -40, -66]), belt(330, 220, 180, -62, 62), p.hole(330, 82, 17)],
  'first-loop': ['First loop centred on the wire, both ends long', k.closed(k.work(190, 270, -1, 20), 30, 11), k.sight('M60 270H640')],
  'close-first': ['One turn round the neck, the end still long', k.closed(k.work(190, 270, -1, 20), 30), k.wound(k.work(190, 270, -1, 20), [1.87], 11), p.look(226, 270, 44)],
  'thread': ['Bead slid along the wire to the one turn at the first loop', k.closed(k.work(160, 270, -1, 18), 30), k.wound(k.work(160, 270, -1, 18), [1.87], 9), p.bead(400, 270, R * 18), p.arrow('M470 90H350', [344, 90], 180)],
  'second-loop': ['Both loops turned and in one plane, the bead between, both ends long', longEnds, p.bead(330, 270, R * 18)],
  'cap': ['Cap coiled outward over the shoulder, each turn touching the last', p.bead(300, 290, 165), k.rope(path(capTop(300, 290, 22, -0.4, 3)) + 'L640 268', 22), loopTop(300, 290, 22), k.rope(path(capTop(300, 290, 22, -0.22, 0.22)), 22), p.arrow('M612 222A190 130 0 0 0 520 120', [515, 117], 215)],
  'hooks': ['Both legs hooked at the end, one the mirror of the other', linkSide(330, 290, 18), hooked(330 - stands(3.25) * 18, 290, 18, 1), hooked(330 + stands(3.25) * 18, 290, 18, -1), k.ghost('M330 20V130')],
  'scroll': ['Scroll held flat in smooth jaws, rolled a little at a time', k.rope(path(spiral(250, 220, 1.7, 0.4, 1, 26)) + 'L232 424', 26), p.at(256, 214, 0, k.flatOver()), p.arrow('M384 190A124 124 0 0 0 280 92', [274, 91], 188)],
  'lay': ['Thumb bending the leg at the cap, the scroll seen edge on coming down to the bead', k.ghost(`M${n(200 + stands(3.25) * 20)} 210V70`, 3), profile(200, 290, 20), p.at(392, 214, -8, p.finger(230)), p.arrow('M330 90A150 150 0 0 0 272 108', [262, 112], 160)],
  'paper': ['Slip of paper drawn between scroll and bead', k.closed(work(200, 290, 1, 20), 3), p.bead(200, 290, R * 20), slip, edge(200, 290, 20, 0.95), capSide(200, 290, 1, 20), p.arrow('M150 60L100 28', [96, 26], 214)],
  'lay-out': ['Scrolled links and the beads between them in the groove of a board', p.steel('M20 120H640V320H20Z', '#d9b98c'), p.steel('M20 178H640V262H20Z', '#c6a573'), linkScrolled(150, 220, 6.6), p.bead(330, 220, 50), linkScrolled(510, 220, 6.6)],
  'pick': ['Open loop of the connector with the closed loop of a scrolled link in it', k.rolled(openLoop, 7, 275, 1), linkScrolled(C2 + (HOLE + k.ROUND) * 18, 230, 18), k.rope(path(overArc), 18, 'butt')],
  'plain-cap': ['Both caps coiled, both ends still long', leg(330, 270, 18, 1, 13), leg(330, 270, 18, -1, 13), linkSide(330, 270, 18)],
  'tip': ['Cutter held two wires off the cap, flat side to the stub', ...(() => {
    const tool = k.pliers([k.blade(standsAt - 2, cutAt, [0, 1], [-1, 0], 34), k.blade(standsAt + 2, cutAt, [0, 1], [1, 0], 34)], [170, -120], { grow: 2 })
    return [tool.back, nearCap(10), tool.front]
  })(), p.line(`M${standsAt + 30} ${cutAt}h40M${standsAt + 30} ${C.y - 3.75 * C.w}h40M${standsAt + 54} ${cutAt}V${C.y - 3.75 * C.w}`, 3), p.text(standsAt + 72, cutAt + 44, 'stub', 30, p.BRASS, 'start')],
  'dome': ['Cup bur on the stub, square to it', nearCap(5.75), bur(standsAt, cutAt, C.w), twist(standsAt, cutAt - 2.6 * C.w)],
}
