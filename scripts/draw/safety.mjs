/** Pictures of bench safety. */
import * as p from './parts.mjs'

const APRON = '#e9d6a8'
const CLOTH = '#dfe3e4'
const SHADE = '#c9d0d3'
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

export const SAFETY = {
  'room': ['Plan of one room with seven places to find',
    p.line('M278 412H24V24H636V412H382', 6), shape('M278 412V312A104 100 0 0 1 382 412', '#fffdf8'), p.text(322, 388, 'exit', 26),
    place(128, 76, 'cool water', drop), place(330, 76, 'eye-wash', eye), place(532, 76, 'first-aid box', cross),
    place(120, 312, 'extinguisher', bottle), place(532, 312, 'fire blanket', blanket), place(330, 214, 'master stop', button)],
  'pin': ['Person at the bench from the side, pin at breastbone height',
    p.steel('M330 226H640V250H330Z', '#d9b98c'), p.line('M600 250V424', 8), p.steel('M256 214L340 204V226H256Z', '#e3cfa4'),
    p.steel('M110 338H230V356H110Z', '#d9b98c'), p.line('M126 356V424M214 356V424', 8),
    shape('M150 338Q140 200 168 172Q190 150 214 172Q234 220 222 300L306 304Q318 306 318 320V420H282V342L160 346Z', CLOTH),
    shape('M180 188Q196 176 206 192L214 262L268 214L280 232L222 296Q206 304 196 288Z', SHADE), ring(274, 216, 14, p.SKIN),
    shape('M178 158V138H206V164Q192 172 178 158Z', p.SKIN), ring(198, 106, 42, p.SKIN), shape('M158 118Q146 62 198 60Q232 62 236 88Q200 84 190 120Q176 134 158 118Z', HAIR),
    p.line('M60 214H640', 3, p.GARNET)],
  'dress': ['From behind: hair tied, apron tied, sleeves above the elbow',
    shape('M214 440V214Q214 160 270 150H390Q446 160 446 214V440Z', CLOTH),
    shape('M214 200L180 300L222 314L240 240Z', CLOTH), shape('M446 200L480 300L438 314L420 240Z', CLOTH),
    shape('M184 302L168 400H204L220 313Z', p.SKIN), shape('M476 302L492 400H456L440 313Z', p.SKIN),
    shape('M306 160V120H354V160Q330 176 306 160Z', p.SKIN), ring(330, 82, 54, HAIR), ring(330, 82, 22, HAIR), p.line('M308 82A22 22 0 0 0 352 82', 6, p.GARNET),
    shape('M214 440V330Q240 300 246 296V440ZM446 440V330Q420 300 414 296V440Z', APRON), p.line('M296 152L250 300M364 152L410 300', 7, '#9a7a35'), p.line('M246 304H414', 9, '#9a7a35'),
    p.line('M330 304C290 268 262 300 330 304C398 300 370 268 330 304L304 366M330 304L356 366', 6, p.GARNET)],
  'tray': ['Tray with the tools in their places', p.steel('M60 60H600V390H60Z', '#efe4cd'), p.at(120, 120, 0, `<g transform="scale(.9)">${p.flatNose(5)}</g>`), p.at(120, 225, 0, `<g transform="scale(.9)">${p.roundNose(5)}</g>`), p.at(120, 330, 0, `<g transform="scale(.9)">${p.cutter(7)}</g>`), p.text(555, 130, '1', 30, p.BRASS), p.text(555, 235, '2', 30, p.BRASS), p.text(555, 340, '3', 30, p.BRASS)],
  'cut': ['Cutter over the bin, a finger on the offcut', p.at(300, 300, 0, p.bin()), p.wire('M40 220H326', 16), p.wire('M334 220H440', 16), p.at(330, 222, -90, `<g transform="scale(.7)">${p.cutter(9)}</g>`), p.at(418, 212, -12, p.finger(190))],
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
