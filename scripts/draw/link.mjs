/** Pictures of the wrapped-loop link: first loop to the left, bead and second loop to its right, all drawn to one scale. */
import * as p from './parts.mjs'
import * as k from './wirework.mjs'

const W = 20
const NECK = 3.5            // from the bend to the bead, in wires: the turns and room for the crossing
const BEAD = 5.71           // half a bead of 8 mm, in wires of 0.7
const first = k.work(250, 240, -1)
const second = k.work(390, 240, 1)
/** First end with its turns, at `x`, and the bead after it. */
const firstEnd = (x, y, long, w = W) => { const f = k.work(x, y, -1, w); return k.closed(f, long) + k.wound(f, k.PLACES) }
const beadAfter = f => p.bead(f.x - f.dir * (NECK + BEAD) * f.w, f.y, BEAD * f.w)

/** Jaw in the loop and jaw outside it, at `degrees` round the loop; `away` is where the handles go. */
const inLoop = (f, outside, away) => {
  const inner = (k.ROUND - 0.5) * f.w
  const [x, y] = k.place(f, k.ROUND, 0)
  const [ox, oy] = k.place(f, ...outside)
  return k.pliers([k.roundJaw(ox, oy, 1.2 * f.w), k.roundJaw(x, y, inner - 2)], away)
}
const between = (tool, ...parts) => [tool.back, ...parts, tool.front]
/** Flat jaws above and below the wire, over a neck's width. */
const onNeck = (f, away) => k.pliers([k.flatJaw(...k.place(f, -2, 0.5), 2.8 * f.w, 50, 1), k.flatJaw(...k.place(f, -2, -0.5), 2.8 * f.w, 50, -1)], away)
/** Cutter across a tail that stands up at `a`: flat faces down on the turn. */
const acrossTail = (f, a, b, away, long = 60) => {
  const [x, y] = k.place(f, a, b)
  return k.pliers([k.blade(x - 2, y, [0, 1], [-1, 0], long), k.blade(x + 2, y, [0, 1], [1, 0], long)], away, { grow: long < 40 ? 2.4 : 1.2 })
}
/** Bent jaws that press the end at `a` to the neck, above and below the turns. */
const press = (f, a, away) => k.pliers([k.flatJaw(...k.place(f, a, 2), 1.1 * f.w, 44, 1), k.flatJaw(...k.place(f, a, -1.5), 1.1 * f.w, 44, -1)], away)

/** Open loop with the closed loop of a neighbour in it: over at one crossing, under at the other. */
const hung = (f) => {
  const [x, y] = k.place(f, k.ROUND + 2.9, 0)
  return [k.closed(f, f.dir < 0 ? 18 : 3.6, 7), k.rope(`M${x + 53} ${y}A53 53 0 1 1 ${x - 53} ${y}A53 53 0 1 1 ${x + 53} ${y}`), k.rope(k.arcOf(f, 105, 150), W, 'butt')]
}

const big = k.work(225, 230, -1, 34)
const close = k.work(235, 260, -1, 30)
const closeSecond = k.work(400, 260, 1, 30)
const mm = Array.from({ length: 91 }, (_, i) => p.line(`M${i * 6} 0v${i % 10 === 0 ? 34 : i % 5 === 0 ? 26 : 16}`, i % 5 === 0 ? 2 : 1)).join('')
const mmRule = p.steel('M0 0H552V70H0Z', '#f4efe2') + mm

export const LINK = {
  'straighten': ['Wire drawn through nylon jaws', ...(() => {
    const jaws = k.pliers([k.flatJaw(300, 220, 110, 62, 1), k.flatJaw(300, 240, 110, 62, -1)], [90, 190], { tip: '#fffdf6', body: '#ece3cb', grow: 1.1 })
    return [jaws.back, k.rope('M30 330C90 240 120 330 170 280S230 230 300 230H560'), jaws.front]
  })(), p.arrow('M480 150H590', [596, 150], 0)],
  'bead-hole': ['A bead under the loupe', p.bead(330, 220, 150), p.hole(370, 190, 34), p.loupe(350, 205, 175), p.look(370, 190, 62)],
  'cut': ['Cutter at the mark, flat side to the piece kept, finger on the offcut', p.at(390, 300, 0, p.bin()), ...between(k.pliers([k.blade(380, 208, [-1, 0], [0, -1], 64), k.blade(380, 212, [-1, 0], [0, 1], 64)], [-90, -190], { grow: 1 }), k.rope('M30 210H560')), p.line('M374 196V224', 5), p.at(470, 202, 0, p.finger(190))],
  'mark': ['Ink mark on the wire, measured from its end along the rule', p.at(60, 260, 0, mmRule), k.rope('M70 244H640'), p.line('M330 232V257', 6), p.arrow('M330 120V208', [330, 214], 90)],
  'bend': ['Neck between the jaws, the end pushed over square', k.ghost('M60 240H240'), ...between(onNeck(first, [150, 160]), k.bent(first, 18, 8)), p.at(212, 150, 0, '<g transform="scale(-1 1)">', p.finger(220), '</g>')],
  'turn': ['Jaw in the bend, the wire rolled over it', ...between(inLoop(first, [-1.8, 1.8], [110, 170]), k.rolled(first, 18, 205, 5)), p.arrow('M232 110A120 120 0 0 0 96 168', [92, 176], 112)],
  'circle': ['Jaw moved to the other side, wire crossing in front of the neck', ...between(inLoop(first, [3.9, 4.1], [-40, 190]), k.closed(first, 18, 7)), p.look(264, 240, 50)],
  'centre': ['The line of the wire through the middle of the loop', p.at(190, 240, 0, ''), k.closed(first, 18, 6), p.at(190, 240, 0, k.flatOver()), k.ghost('M262 240L600 318'), p.arrow('M500 350Q520 310 514 262', [513, 258], -94), k.sight('M150 240H640')],
  'across': ['Calliper across the loop, the second place at right angles', ...(() => {
    const f = k.work(400, 220, -1, 30)
    const [x, y] = k.place(f, k.ROUND, 0)
    const reach = (k.ROUND + 0.5) * 30
    const jaws = [-1, 1].map(side => p.steel(`M${side * reach} -16L${side * (reach + 26)} 6V560H${side * reach}Z`))
    return [k.closed(f, 12, 5), p.at(x, y, 45, k.ghost(`M0 ${-reach - 40}V${reach + 40}`), ...jaws)]
  })()],
  'hang': ['Neighbour hanging in the open loop', ...hung(first)],
  'hang-second': ['Neighbour hanging in the open loop of the second end', ...hung(second), beadAfter(second)],
  'trim': ['Cutter across the tail, flat side down on the last turn', ...(() => {
    const tool = acrossTail(close, -2.89, 1.75, [150, -190], 60)
    return [tool.back, k.closed(close, 16), k.wound(close, k.PLACES, 6), tool.front]
  })(), p.look(close.x + 2.89 * 30, 214, 34)],
  'press': ['Bent jaws press the wire end down to the neck', ...(() => {
    const tool = press(close, -2.95, [170, 190])
    return [tool.back, k.closed(close, 16), k.wound(close, k.PLACES, 1.5), tool.front]
  })(), p.arrow('M324 40V128', [324, 134], 90)],
  'thread': ['Bead slid down to the turns', firstEnd(170, 240, 24), p.bead(430, 240, BEAD * W), p.arrow('M520 80H400', [394, 80], 180)],
  'bend-second': ['Jaws between the bead and the bend', ...between(onNeck(second, [60, 190]), k.bent(second, 3.6, 8), beadAfter(second)), p.at(440, 150, 0, p.finger(240))],
  'plane': ['First loop and bent end lie flat on one card', p.steel('M20 60H640V380H20Z', '#f4efe2'), k.rope('M186 270H540V120'), firstEnd(170, 270, 4), p.bead(368, 270, BEAD * W)],
  'square': ['First loop seen nearly edge on, bent end standing square to it', k.rope('M172 270H540V120'), k.rope('M64 270a53 17 0 1 0 106 0a53 17 0 1 0 -106 0'), k.wound(k.work(174, 270, -1), [0.87, 1.87, 2.87]), p.bead(368, 270, BEAD * W)],
  'turn-second': ['Jaw in the bend, the wire rolled over it', ...between(inLoop(second, [-1.8, 1.8], [60, 190]), k.rolled(second, 3.6, 205, 5), beadAfter(second)), p.arrow('M408 110A120 120 0 0 1 544 168', [548, 176], 68)],
  'circle-second': ['Jaw moved to the other side, wire crossing in front of the neck', ...between(inLoop(second, [3.9, 4.1], [40, 190]), k.closed(second, 3.6, 7), beadAfter(second)), p.look(376, 240, 50)],
  'centre-second': ['The line of the wire through the middle of the second loop', k.closed(second, 3.6, 7), beadAfter(second), p.at(450, 240, 0, '<g transform="scale(-1 1)">', k.flatOver(), '</g>'), k.sight('M20 240H600')],
  'wrap-second': ['Loop held flat, turns filling the neck, the last at the bead', k.closed(second, 3.6), beadAfter(second), k.wound(second, k.PLACES, 7), p.at(450, 240, 0, '<g transform="scale(-1 1)">', k.flatOver(), '</g>'), p.look(330, 240, 36)],
  'trim-second': ['Cutter across the tail, flat side down on the last turn, clear of the bead', ...(() => {
    const tool = acrossTail(closeSecond, -2.89, 1.75, [150, -190], 17)
    return [tool.back, k.closed(closeSecond, 3.6), beadAfter(closeSecond), k.wound(closeSecond, k.PLACES, 6), tool.front]
  })(), p.look(400 - 2.89 * 30, 214, 34)],
  'press-second': ['Bent jaws press the second end in, clear of the bead', ...(() => {
    const tool = press(closeSecond, -2.75, [170, 190])
    return [tool.back, k.closed(closeSecond, 3.6), beadAfter(closeSecond), k.wound(closeSecond, k.PLACES, 1.5), tool.front]
  })(), p.arrow('M317 40V128', [317, 134], 90)],
  'turns-yes': ['Two and a half turns, closed up, from loop to bead', k.closed(big, 3.4), p.bead(225 + (3.28 + BEAD) * 34, 230, BEAD * 34), k.wound(big, k.PLACES)],
  'turns-nearly': ['A gap between two turns', k.closed(big, 4.2), p.bead(225 + (4.05 + BEAD) * 34, 230, BEAD * 34), k.wound(big, [1.87, 3.5]), p.look(225 + 2.72 * 34, 230, 34)],
  'turns-no': ['Turns that cross, bare neck at the bead', k.closed(big, 4.6), p.bead(225 + (4.5 + BEAD) * 34, 230, BEAD * 34), k.wound(big, [1.87]), k.rope(`M${225 + 3.1 * 34} ${230 - 40}L${225 + 1.5 * 34} ${230 + 40}`, 34), p.look(225 + 2.3 * 34, 230, 74)],
}
