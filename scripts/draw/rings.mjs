/** Pictures of jump rings. */
import * as p from './parts.mjs'

const coilOn = (x, y, n, r) => Array.from({ length: n }, (_, i) => p.wire(`M${x + i * 22} ${y - r}C${x + i * 22 + 16} ${y - r} ${x + i * 22 + 16} ${y + r} ${x + i * 22 + 4} ${y + r}`, 18)).join('')

export const RINGS = {
  'measure': ['Calliper on the wire beside the rod', p.at(120, 330, 0, p.rod(440, 34)), p.wire('M130 120V270', 20), p.at(116, 140, 0, p.calliper(20)), p.look(128, 220, 34)],
  'coil': ['Coil wound close on the rod', p.at(60, 240, 0, p.rod(560, 44)), coilOn(140, 240, 12, 54), p.wire('M404 186C440 120 520 90 630 70', 18), p.arrow('M300 110A150 60 0 0 1 180 110', [176, 108], 200)],
  'tape': ['Coil in tape, laid in the grooved block', p.at(120, 280, 0, p.block(420, 110)), coilOn(210, 262, 11, 50), p.tape(200, 206, 266, 34), p.text(332, 180, 'tape', 26)],
  'saw': ['Saw frame upright, blade along the top of the taped coil', p.at(120, 330, 0, p.block(420, 90)), coilOn(210, 320, 11, 46), p.at(170, 262, 0, p.saw()), p.arrow('M560 320H640', [642, 320], 0)],
  'burr': ['Ring drawn flat over abrasive paper', p.steel('M60 230H600V390H60Z', '#cbb894'), Array.from({ length: 40 }, (_, i) => p.line(`M${80 + (i * 53) % 500} ${250 + (i * 37) % 130}h3`, 3, '#7c725f')).join(''), p.loop(300, 290, 60, 18), p.arrow('M390 290H520', [524, 290], 0)],
  'twist': ['Ends of a ring twisted past each other', p.wire('M318 170A84 84 0 1 0 352 176', 18), p.at(262, 200, 180, p.flatNose(9)), p.at(414, 214, 0, p.flatNose(9)), p.arrow('M352 120V70', [352, 64], -90), p.arrow('M312 120V160', [312, 164], 90)],
  'last': ['Ring closed over two hanging links', p.loop(330, 130, 80, 18), p.loop(260, 280, 70, 14), p.loop(400, 280, 70, 14), p.look(330, 50, 26)],
}
