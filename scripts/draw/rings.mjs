/** Pictures of jump rings. */
import * as p from './parts.mjs'
import { rope } from './wirework.mjs'

const W = 18
const n = value => Number(value.toFixed(1))
const circle = (x, y, r) => rope(`M${x} ${y - r}A${r} ${r} 0 1 1 ${x - 0.1} ${y - r}`, W)
/** A piece of a circle, to be seen in front; degrees clockwise from the top. */
const arc = (x, y, r, from, to) => {
  const on = degrees => [n(x + r * Math.sin(degrees * Math.PI / 180)), n(y - r * Math.cos(degrees * Math.PI / 180))]
  return rope(`M${on(from).join(' ')}A${r} ${r} 0 0 1 ${on(to).join(' ')}`, W, 'butt')
}
/** Coil seen from the side, its turns touching. */
const coil = (x, y, count, r) => Array.from({ length: count }, (_, i) => rope(`M${x + i * W} ${y - r}L${x + i * W + 6} ${y + r}`, W)).join('')
/** Tape lets the turns be seen. */
const taped = (x, y, width, height) => `<rect x="${x}" y="${y}" width="${width}" height="${height}" fill="#efe2bd" fill-opacity="0.5" stroke="${p.BRASS}" stroke-width="2"/>`

/** A ring opened sideways, seen from before and above: its two ends stand one before the other. */
const opened = (x, y, r, apart) => {
  const at = (degrees) => {
    const t = degrees * Math.PI / 180
    return `${n(x - r * Math.sin(t))} ${n(y - 0.75 * r * Math.cos(t) + apart * (degrees / 180 - 1))}`
  }
  const part = (from, to) => rope(`M${Array.from({ length: Math.round((to - from) / 5) + 1 }, (_, i) => at(from + i * 5)).join('L')}`, W)
  return part(-10, 370)
}

/** Flat pliers seen on one jaw: the other is behind the wire. */
const jaw = () => p.line('M190 0H420', 30, p.STEEL) + p.line('M190 0H420', 24, '#b9c3c8') + p.steel('M0 -15L180 -30V30L0 15Z') + `<circle cx="186" cy="0" r="30" fill="#dfe3e4" stroke="${p.STEEL}" stroke-width="2.5"/><circle cx="186" cy="0" r="8" fill="${p.STEEL}"/>`

export const RINGS = {
  'measure': ['Calliper on the wire beside the rod', p.at(120, 330, 0, p.rod(440, 34)), rope('M141 160V280', W), p.at(116, 140, 0, p.calliper(35)), p.look(141, 226, 40)],
  'trial': ['Calliper across the outside of three trial turns', Array.from({ length: 3 }, (_, i) => rope(`M104 ${214 + i * W}L218 ${218 + i * W}`, W)).join(''), p.at(80, 130, 0, p.steel('M-20 -34H560V-2H-20Z') + p.calliper(148)), p.dimension(95, 227, 330, 'outside')],
  'coil': ['Coil wound close on the rod', p.at(60, 240, 0, p.rod(560, 44)), coil(140, 240, 14, 54), rope('M392 186C430 120 520 90 640 70', W), p.arrow('M300 110A150 60 0 0 1 180 110', [176, 108], 200)],
  'tape': ['Coil wrapped in tape over its whole length', coil(200, 250, 14, 60), taped(180, 176, 290, 148), p.steel('M180 176H470V120Q470 60 520 50H230Q180 60 180 120Z', '#efe2bd'), p.arrow('M520 200A60 60 0 0 1 520 310', [514, 312], 160)],
  'saw': ['Frame upright, blade along the top of the taped coil in its groove', coil(190, 300, 12, 46), taped(172, 240, 244, 90), p.steel('M90 296H520V410H90Z', '#d9b98c'), p.line('M90 312H520', 2), p.at(130, 240, 0, p.saw()), p.arrow('M530 310H610', [614, 310], 0)],
  'burr': ['Ring drawn flat over abrasive paper', p.steel('M60 130H600V390H60Z', '#cbb894'), Array.from({ length: 60 }, (_, i) => p.line(`M${80 + (i * 53) % 500} ${150 + (i * 37) % 224}h3`, 3, '#7c725f')).join(''), circle(280, 260, 64), p.line('M280 187V205', 3), p.arrow('M380 260H520', [524, 260], 0)],
  'twist': ['Ends of a ring twisted past each other, one before the other', opened(330, 270, 110, 26), p.at(262, 188, 188, `<g transform="scale(.8)">${jaw()}</g>`), p.at(398, 222, -2, `<g transform="scale(.8)">${jaw()}</g>`), p.arrow('M180 130V84', [180, 78], -90), p.arrow('M480 270V316', [480, 322], 90)],
  'last': ['Ring closed through two links that hang in it', circle(330, 150, 100), circle(228, 288, 84), circle(432, 288, 84), arc(330, 150, 100, 176, 214), arc(330, 150, 100, 104, 146), p.line('M330 41V59', 3), p.look(330, 50, 28)],
}
