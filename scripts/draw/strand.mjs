/** Pictures of the knotted strand and of the bead cap. */
import * as p from './parts.mjs'

const row = (n, x = 70, y = 220, r = 30, gap = 2) => Array.from({ length: n }, (_, i) => p.bead(x + i * (r * 2 + gap), y, r)).join('')
const knot = (x, y) => `<circle cx="${x}" cy="${y}" r="10" fill="#8b7b5f"/><path d="M${x - 7} ${y - 6}q7 8 14 0M${x - 7} ${y + 5}q7 -8 14 0" stroke="#f7f3ea" stroke-width="2" fill="none"/>`
const clasp = (x, y) => `${p.steel(`M${x} ${y - 34}H${x + 110}Q${x + 140} ${y} ${x + 110} ${y + 34}H${x}Z`, '#e9d6a8')}<circle cx="${x - 20}" cy="${y}" r="20" fill="none" stroke="${p.BRASS}" stroke-width="8"/>`

export const STRAND = {
  'stretch': ['Silk hung from a peg with a light weight', p.steel('M240 40H420V66H240Z', '#d9b98c'), p.cord('M330 66V320'), p.steel('M296 320H364L378 396H282Z'), p.arrow('M430 150V280', [430, 286], 90)],
  'choose': ['End beads set apart on the board', p.steel('M30 130H630V320H30Z', '#d9c9b0'), row(3, 76, 225, 28), row(3, 276, 225, 28), row(3, 478, 225, 28), p.line('M232 140V310M440 140V310', 3, p.GARNET)],
  'ream': ['Bead in the grooved block under water', p.steel('M90 190H570V400H90Z', '#d5e3e8'), p.line('M90 216q30 -12 60 0t60 0t60 0t60 0t60 0t60 0t60 0t60 0', 3, p.STEEL), p.at(230, 320, 0, p.block(200, 70)), p.bead(330, 300, 44), p.at(330, 256, -90, `${p.steel('M0 -5H90L96 -18H250V18H96L90 5H0Z')}`), p.arrow('M420 120A60 30 0 1 1 380 150', [378, 152], 160)],
  'thread': ['Needle through the row of beads', p.cord('M20 220H640'), row(7, 130, 220), p.at(560, 220, 0, `<g transform="scale(.5)">${p.needle()}</g>`)],
  'knot': ['Knot closed on the tip of the tweezers, touching the bead', p.cord('M20 230H640'), p.bead(150, 230, 80), p.at(250, 230, -24, p.tweezers(6)), `<g transform="translate(246 230) scale(2)">${knot(0, 0)}</g>`, p.look(240, 230, 40)],
  'clasp': ['Cord through the ring of the clasp, gimp round the loop', clasp(470, 220), p.bead(160, 220, 70), p.cord('M20 220H300M300 220C380 160 430 190 452 220C430 250 380 280 300 220'), p.line('M380 188q8 8 16 0t16 0t16 4', 6, p.BRASS), p.look(440, 216, 44)],
  'return': ['Needle going back through the bead beside the clasp', clasp(500, 220), p.bead(350, 220, 80), p.bead(170, 220, 80), p.cord('M20 212H480M480 220C470 250 440 236 430 228'), p.at(266, 230, 180, `<g transform="scale(.7)">${p.needle()}</g>`), p.arrow('M420 330H280', [274, 330], 180)],
  'glue': ['Drop on the needle tip at the hole', p.bead(220, 260, 130), p.hole(344, 240, 18), p.at(360, 230, -30, p.needle()), '<path d="M352 222q18 20 4 30q-16 -4 -4 -30Z" fill="#e9d6a8" stroke="#63440a" stroke-width="2"/>', p.look(352, 236, 34)],
  'hang': ['Strand hung from a peg to set', p.steel('M260 30H400V56H260Z', '#d9b98c'), p.cord('M330 56C200 180 200 330 330 390C460 330 460 180 330 56'), Array.from({ length: 12 }, (_, i) => { const t = (i + 1) / 13 * Math.PI * 2 - Math.PI / 2; return p.bead(330 + 104 * Math.cos(t), 236 + 150 * Math.sin(t), 22) }).join('')],
}

const B = [330, 250, 150]
const capTurns = n => Array.from({ length: n }, (_, i) => p.wire(`M${B[0] - 40 - i * 26} ${116 + i * 16}A${60 + i * 26} ${20 + i * 7} 0 0 0 ${B[0] + 40 + i * 26} ${116 + i * 16}`, 15)).join('')
const bigBead = p.bead(...B)
const topLoop = `${p.wire('M330 100V76')}${p.loop(330, 40, 34, 12)}`

export const CAP = {
  'two-links': ['Two copper links beside the rule, wire left over under each', p.at(60, 350, 0, p.rule(540, 40)), ...[100, 240].flatMap(y => [p.loop(120, y, 26, 9), p.bead(200, y, 44), p.loop(280, y, 26, 9), p.scroll(180, y + 4, 1.6, 1, 9, 6), p.wire(`M360 ${y}H${y === 100 ? 560 : 548}`, 9)])],
  'guard': ['Tape over the facets, both holes free', bigBead, p.line('M200 180L330 110L460 180M190 300L330 390L470 300M260 130V370M400 130V370', 2, p.STEEL), p.tape(196, 206, 268, 90), p.hole(330, 106, 14), p.hole(330, 394, 14)],
  'hooks': ['Two hooks, one each way', p.bead(330, 220, 90), p.wire('M240 220H130C100 220 100 180 130 180'), p.wire('M420 220H530C560 220 560 260 530 260'), p.arrow('M150 120A50 50 0 0 0 84 190', [84, 196], 95), p.arrow('M510 320A50 50 0 0 0 576 250', [576, 244], -85)],
  'lay': ['Scroll laid on the bead with the thumb', bigBead, topLoop, capTurns(3), p.scroll(290, 280, 2, 1, 16, 12), p.at(330, 330, 12, p.finger(220)), p.look(290, 280, 60)],
  'plain-cap': ['Both caps coiled, the hole covered', bigBead, topLoop, capTurns(3), `<g transform="translate(0 500) scale(1 -1)">${capTurns(3)}</g>`],
  'pick': ['Open loop picking up a scrolled link', p.bead(130, 240, 80), p.wire('M208 240H300'), p.wire('M300 240C300 180 360 160 400 190C440 220 420 280 380 290'), p.loop(470, 240, 44, 12), p.bead(570, 240, 60), p.arrow('M470 140H420', [414, 140], 180)],
  'tip': ['Cutter held off the cap, the stub left standing', bigBead, capTurns(3), p.wire('M330 110V50'), p.at(340, 62, -20, p.cutter(8)), p.dimension(270, 312, 60, 'stub')],
  'dome': ['Cup bur on the stub, square to it', p.bead(330, 380, 150), p.wire('M330 230V150', 20), p.at(330, 150, -90, `${p.steel('M0 -20Q-14 0 0 20H40L50 8H150V-8H50L40 -20Z')}${p.steel('M150 -18H320V18H150Z', '#e3cfa4')}`), p.arrow('M400 120A60 24 0 1 1 380 160', [376, 160], 170)],
}
