/** Pictures of the knotted strand. */
import * as p from './parts.mjs'

const row = (n, x = 70, y = 220, r = 30, gap = 2) => Array.from({ length: n }, (_, i) => p.bead(x + i * (r * 2 + gap), y, r)).join('')
const knot = (x, y) => `<circle cx="${x}" cy="${y}" r="10" fill="#8b7b5f"/><path d="M${x - 7} ${y - 6}q7 8 14 0M${x - 7} ${y + 5}q7 -8 14 0" stroke="#f7f3ea" stroke-width="2" fill="none"/>`
const clasp = (x, y) => `${p.steel(`M${x + 30} ${y - 34}H${x + 130}Q${x + 160} ${y} ${x + 130} ${y + 34}H${x + 30}Z`, '#e9d6a8')}<circle cx="${x}" cy="${y}" r="32" fill="none" stroke="${p.STEEL}" stroke-width="12"/><circle cx="${x}" cy="${y}" r="32" fill="none" stroke="#e9d6a8" stroke-width="7"/>`
const at2 = (x, y) => `<g transform="translate(${x} ${y}) scale(2)">${knot(0, 0)}</g>`
/** Fine wire coil on the cord: its turns are seen across it. */
const gimp = d => `<path d="${d}" fill="none" stroke="${p.BRASS}" stroke-width="16"/><path d="${d}" fill="none" stroke="#dcb35f" stroke-width="12" stroke-dasharray="4 2"/>`
/** Gimp through the ring of a clasp, its near edge at x: behind the ring, the ring, before it. */
const held = (x, y, from) => `${gimp(`M${from} ${y + 30}C${x - 40} ${y + 34} ${x + 14} ${y + 34} ${x + 14} ${y}`)}${clasp(x + 30, y)}${gimp(`M${from} ${y - 18}C${x - 40} ${y - 20} ${x + 14} ${y - 30} ${x + 14} ${y + 2}`)}`

export const STRAND = {
  'stretch': ['Silk hung from a peg with a light weight', p.steel('M240 40H420V66H240Z', '#d9b98c'), p.cord('M330 66V320'), p.steel('M296 320H364L378 396H282Z'), p.arrow('M430 150V280', [430, 286], 90)],
  'choose': ['Three end beads set apart at each end of the board', p.steel('M14 110H646V330H14Z', '#d9c9b0'), row(3, 50, 175, 26), row(5, 222, 270, 26), row(3, 502, 175, 26), p.line('M190 126V316M470 126V316', 3, p.GARNET)],
  'ream': ['Bead in the grooved block under water', p.steel('M90 190H570V400H90Z', '#d5e3e8'), p.line('M90 216q30 -12 60 0t60 0t60 0t60 0t60 0t60 0t60 0t60 0', 3, p.STEEL), p.at(230, 320, 0, p.block(200, 70)), p.bead(330, 300, 44), p.at(330, 256, -90, `${p.steel('M0 -5H90L96 -18H250V18H96L90 5H0Z')}`), p.arrow('M420 120A60 30 0 1 1 380 150', [378, 152], 160)],
  'thread': ['Needle through the row of beads', p.cord('M20 220H530'), row(7, 90, 220), p.at(650, 220, 180, `<g transform="scale(.55)">${p.needle()}</g>`)],
  'knot': ['Knot closed on the tip of the tweezers, touching the bead', p.cord('M20 230H640'), p.bead(150, 230, 80), p.at(250, 230, -24, p.tweezers(6)), `<g transform="translate(246 230) scale(2)">${knot(0, 0)}</g>`, p.look(240, 230, 40)],
  'clasp': ['Gimp on the cord, lying through the ring of the clasp', p.cord('M20 204H280M280 254Q200 262 130 330'), p.at(20, 372, -24, `<g transform="scale(.5)">${p.needle()}</g>`), held(400, 222, 270), p.bead(120, 204, 64)],
  'knots': ['Knot touching its bead; below, a knot with cord showing', p.cord('M20 120H410M20 320H430'), p.bead(120, 120, 62), p.bead(284, 120, 62), at2(202, 120), p.text(450, 130, 'tight', 32, p.INK, 'start'), p.bead(120, 320, 62), p.bead(324, 320, 62), at2(242, 320), p.text(450, 330, 'cord shows', 32, p.INK, 'start'), p.look(203, 320, 26)],
  'gimp': ['Gimp threaded on the cord, touching the end bead', p.cord('M20 220H520'), gimp('M206 220H310'), p.bead(130, 220, 76), p.at(640, 220, 180, `<g transform="scale(.6)">${p.needle()}</g>`), p.arrow('M440 310H330', [324, 310], 180)],
  'return': ['Needle going back through the bead beside the clasp', p.cord('M20 206H360'), p.at(176, 246, 0, `<g transform="scale(.6)">${p.needle()}</g>`), held(470, 222, 420), p.bead(80, 222, 66), p.bead(364, 222, 66), p.arrow('M330 350H200', [194, 350], 180)],
  'glue': ['Drop on the needle tip at the hole of the bead, where the tail comes out', p.cord('M20 236H180M250 236H640'), p.cord('M250 228C330 222 380 170 450 90', 4), p.bead(170, 236, 130), `<g transform="translate(322 240) scale(2)">${knot(0, 0)}</g>`, p.at(308, 258, 42, p.needle()), '<path d="M302 244q-12 14 0 24q14 -6 8 -18Z" fill="#e9d6a8" stroke="#63440a" stroke-width="2.5"/>', p.look(302, 250, 32)],
  'hang': ['Strand hung from a peg to set', `<ellipse cx="330" cy="242" rx="116" ry="168" fill="none" stroke="#8b7b5f" stroke-width="6"/>`, Array.from({ length: 19 }, (_, i) => { const t = (i + 1) / 20 * Math.PI * 2 - Math.PI / 2; return p.bead(330 + 116 * Math.cos(t), 242 + 168 * Math.sin(t), 20) }).join(''), p.steel('M310 84A20 20 0 0 1 350 84L344 96H316Z', '#d9b98c'), p.line('M330 66V30', 3), p.steel('M240 20H420V40H240Z', '#d9b98c')],
}
