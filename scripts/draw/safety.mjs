/** Pictures of bench safety. */
import * as p from './parts.mjs'

const APRON = '#e9d6a8'
const CLOTH = '#dfe3e4'
const HAIR = '#7c725f'
const shape = (d, fill) => `<path d="${d}" fill="${fill}" stroke="${p.INK}" stroke-width="3" stroke-linejoin="round"/>`
const ring = (x, y, r, fill, width = 3) => `<circle cx="${x}" cy="${y}" r="${r}" fill="${fill}" stroke="${p.INK}" stroke-width="${width}"/>`

/** A place on the plan: its sign and, beneath, its name. */
const place = (x, y, words, ...sign) => p.at(x, y, 0, shape('M-34 -34H34V34H-34Z', '#fffdf8'), ...sign, p.text(0, 66, words, 24))
const drop = p.line('M0 -26C6 -12 17 -2 17 9A17 17 0 0 1 -17 9C-17 -2 -6 -12 0 -26Z', 4, p.STEEL)
const eye = p.line('M-26 0Q0 -26 26 0Q0 26 -26 0Z', 4, p.STEEL) + ring(0, 0, 8, p.INK)
const cross = shape('M-8 -24H8V-8H24V8H8V24H-8V8H-24V-8H-8Z', '#fffdf8')
const bottle = shape('M-12 26V-8Q-12 -16 0 -16Q12 -16 12 -8V26Z', p.GARNET) + p.line('M0 -16V-24M0 -24H-18L-22 -10', 4)
const blanket = shape('M-22 -20H22V14H-22Z', '#e3cfa4') + p.line('M-10 14V26M10 14V26', 5)
const button = ring(0, 0, 24, '#fffdf8') + ring(0, 0, 14, p.GARNET)

/** Saw frame hung from its handle: nose down, blade on the side of x = 0, its back to the left. */
const hungSaw = scale => `<g transform="rotate(-90) scale(${scale})">${p.saw()}</g>`

const man = (x) => `<path d="M${x} 330V210Q${x} 150 ${x + 60} 140H${x + 90}" fill="none" stroke="${p.INK}" stroke-width="5"/><circle cx="${x + 16}" cy="96" r="44" fill="${p.SKIN}" stroke="${p.INK}" stroke-width="3"/>`

export const SAFETY = {
  'room': ['Plan of one room with seven places to find',
    p.line('M278 412H24V24H636V412H382', 6), shape('M278 412V312A104 100 0 0 1 382 412', '#fffdf8'), p.text(322, 388, 'exit', 26),
    place(128, 76, 'cool water', drop), place(330, 76, 'eye-wash', eye), place(532, 76, 'first-aid box', cross),
    place(120, 312, 'extinguisher', bottle), place(532, 312, 'fire blanket', blanket), place(330, 214, 'master stop', button)],
  'pin': ['Person at the bench, pin at breastbone height', man(170), p.steel('M300 196H620V216H300Z', '#d9b98c'), p.steel('M250 190H330V204H250Z', '#e3cfa4'), p.steel('M130 330H240V346H130Z', '#d9b98c'), p.line('M150 346V420M220 346V420M600 216V420', 5), p.line('M90 196H620', 2, p.GARNET)],
  'dress': ['Apron tied behind, hair tied, sleeves up', ring(330, 90, 56, p.SKIN), `<path d="M282 62Q330 10 378 62Q392 30 420 50Q416 74 384 76" fill="${HAIR}" stroke="${p.INK}" stroke-width="3"/>`, p.steel('M230 400V230Q230 160 290 154H370Q430 160 430 230V400Z', APRON), p.line('M230 290H430', 5), p.line('M330 290q-40 30 -26 60M330 290q40 30 26 60', 5, p.GARNET), p.look(330, 300, 60)],
  'tray': ['Tray with the tools in their places', p.steel('M60 90H600V360H60Z', '#efe4cd'), p.at(120, 150, 0, `<g transform="scale(.9)">${p.flatNose(5)}</g>`), p.at(120, 230, 0, `<g transform="scale(.9)">${p.roundNose(5)}</g>`), p.at(120, 310, 0, `<g transform="scale(.9)">${p.cutter(7)}</g>`), p.text(555, 160, '1', 30, p.BRASS), p.text(555, 240, '2', 30, p.BRASS), p.text(555, 320, '3', 30, p.BRASS)],
  'cut': ['Cutter over the bin, a finger on the offcut', p.at(230, 290, 0, p.bin()), p.wire('M60 210H430', 16), p.at(330, 210, -90, `<g transform="scale(.8)">${p.cutter(9)}</g>`), p.at(372, 204, 0, p.finger(160)), p.look(330, 210, 30)],
  'pass': ['Pliers handed over, handle first', p.at(600, 230, 180, p.flatNose(5)), p.at(520, 260, 0, p.finger(120)), p.flip(330, p.at(520, 260, 0, p.finger(120))), p.arrow('M360 120H220', [214, 120], 180)],
  'carry-saw': ['Saw frame hanging from the hand beside the leg, blade towards the leg',
    p.at(-90, 0, 0,
      shape('M404 440V20H650V440Z', CLOTH), shape('M430 440V20H650V440Z', APRON),
      shape('M404 20C360 20 330 60 322 110L296 168L336 186L364 130L404 100Z', CLOTH),
      p.at(312, 404, 0, hungSaw(0.62)),
      shape('M296 168L336 186Q346 160 340 140L330 128L300 134Q290 150 296 168Z', p.SKIN),
      p.look(312, 290, 40), p.arrow('M330 360H376', [380, 360], 0)),
  ],
}
