/** Pictures of jump rings and of bench safety. */
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

const man = (x) => `<path d="M${x} 330V210Q${x} 150 ${x + 60} 140H${x + 90}" fill="none" stroke="${p.INK}" stroke-width="5"/><circle cx="${x + 16}" cy="96" r="44" fill="${p.SKIN}" stroke="${p.INK}" stroke-width="3"/>`
const spot = (x, y, words) => `<rect x="${x - 46}" y="${y - 26}" width="92" height="52" fill="#fffdf8" stroke="${p.INK}" stroke-width="2.5"/>${p.text(x, y + 8, words, 24)}`

export const SAFETY = {
  'room': ['Plan of a room with six places to find', p.line('M40 40H620V400H40Z', 5), p.line('M280 400V330M380 400V330', 5), spot(330, 300, 'exit'), spot(110, 90, 'water'), spot(240, 90, 'eyes'), spot(370, 90, 'first'), spot(550, 90, 'fire'), spot(550, 240, 'stop'), p.line('M330 270C250 230 150 200 112 122M128 116C180 150 220 140 238 120M256 118C300 150 350 140 368 120M388 118C440 160 520 140 548 120M550 118V212', 3, p.GARNET)],
  'pin': ['Person at the bench, pin at breastbone height', man(170), p.steel('M300 196H620V216H300Z', '#d9b98c'), p.steel('M250 190H330V204H250Z', '#e3cfa4'), p.steel('M130 330H240V346H130Z', '#d9b98c'), p.line('M150 346V420M220 346V420M600 216V420', 5), p.line('M90 196H620', 2, p.GARNET)],
  'dress': ['Apron tied behind, hair tied, sleeves up', `<circle cx="330" cy="90" r="56" fill="${p.SKIN}" stroke="${p.INK}" stroke-width="3"/><path d="M282 62Q330 10 378 62Q392 30 420 50Q416 74 384 76" fill="#7c725f" stroke="${p.INK}" stroke-width="3"/>`, p.steel('M230 400V230Q230 160 290 154H370Q430 160 430 230V400Z', '#e9d6a8'), p.line('M230 290H430', 5), p.line('M330 290q-40 30 -26 60M330 290q40 30 26 60', 5, p.GARNET), p.look(330, 300, 60)],
  'tray': ['Tray with the tools in their places', p.steel('M60 90H600V360H60Z', '#efe4cd'), p.at(120, 150, 0, `<g transform="scale(.9)">${p.flatNose(5)}</g>`), p.at(120, 230, 0, `<g transform="scale(.9)">${p.roundNose(5)}</g>`), p.at(120, 310, 0, `<g transform="scale(.9)">${p.cutter(7)}</g>`), p.text(555, 160, '1', 30, p.BRASS), p.text(555, 240, '2', 30, p.BRASS), p.text(555, 320, '3', 30, p.BRASS)],
  'cut': ['Cutter over the bin, a finger on the offcut', p.at(230, 290, 0, p.bin()), p.wire('M60 210H430', 16), p.at(330, 210, -90, `<g transform="scale(.8)">${p.cutter(9)}</g>`), p.at(372, 204, 0, p.finger(160)), p.look(330, 210, 30)],
  'pass': ['Pliers handed over, handle first', p.at(600, 230, 180, p.flatNose(5)), p.at(520, 260, 0, p.finger(120)), p.flip(330, p.at(520, 260, 0, p.finger(120))), p.arrow('M360 120H220', [214, 120], 180)],
  'carry-saw': ['Saw frame carried with the blade to the body', p.steel('M90 400V150Q90 90 150 84H210V400Z', '#e9d6a8'), p.at(330, 130, 90, `<g transform="scale(.62)">${p.saw()}</g>`), p.at(330, 360, 0, p.finger(130)), p.look(322, 236, 34)],
}
