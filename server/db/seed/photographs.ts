/** A dozen made photographs for the demo: drawn pieces on a grey bench mat beside a rule in millimetres. */
import sharp from 'sharp'
import { sha256 } from '../../../shared/lesson/canonical'

export type Subject = 'link' | 'rings' | 'strand' | 'cap' | 'hole' | 'board'
export interface MadePhoto { of: Subject, sha: string, bytes: Buffer, width: number, height: number }

const WIDTH = 960
const HEIGHT = 720
/** Pixels for one millimetre in the picture. */
const MM = 16

interface Tone { metal: string, shade: string, bead: string, deep: string, mat: string }
const TONES: Tone[] = [
  { metal: '#c47a4a', shade: '#7d4526', bead: '#7fa3ad', deep: '#3c5f6b', mat: '#8d9296' },
  { metal: '#d8d9d6', shade: '#8b8d8c', bead: '#8a3550', deep: '#4d1526', mat: '#757b7a' },
  { metal: '#c9a552', shade: '#7c6223', bead: '#6c7f4d', deep: '#3b4a24', mat: '#99928a' },
]

/** The rule at the lower edge, a tick each millimetre, a longer one each ten. */
function rule(): string {
  const y = HEIGHT - 74
  const ticks = Array.from({ length: 61 }, (_, i) => `<path d="M${i * MM} ${y}v${i % 10 === 0 ? 34 : i % 5 === 0 ? 24 : 14}" stroke="#1d1d1b" stroke-width="2"/>`).join('')
  const numbers = Array.from({ length: 6 }, (_, i) => `<text x="${(i * 10 + 10) * MM - 20}" y="${y + 62}" font-size="26" font-family="sans-serif" fill="#1d1d1b">${(i + 1) * 10}</text>`).join('')
  return `<g><rect x="0" y="${y}" width="${WIDTH}" height="74" fill="#e4dfd0"/>${ticks}${numbers}</g>`
}

function ground(tone: Tone, seed: number): string {
  return `<defs><radialGradient id="lamp" cx="${30 + seed * 7 % 40}%" cy="22%" r="90%"><stop offset="0" stop-color="#fff" stop-opacity=".42"/><stop offset="1" stop-color="#000" stop-opacity=".38"/></radialGradient>
    <filter id="grain"><feTurbulence type="fractalNoise" baseFrequency=".8" numOctaves="3" seed="${seed}"/><feColorMatrix values="0 0 0 0 .5 0 0 0 0 .5 0 0 0 0 .5 0 0 0 .3 0"/></filter>
    <filter id="soft"><feGaussianBlur stdDeviation="7"/></filter><radialGradient id="glass" cx="35%" cy="30%" r="75%"><stop offset="0" stop-color="#fff"/><stop offset=".28" stop-color="${tone.bead}"/><stop offset="1" stop-color="${tone.deep}"/></radialGradient>
    <linearGradient id="wire" x1="0" y1="0" x2="0" y2="1"><stop offset="0" stop-color="#fff" stop-opacity=".85"/><stop offset=".35" stop-color="${tone.metal}"/><stop offset="1" stop-color="${tone.shade}"/></linearGradient></defs>
    <rect width="${WIDTH}" height="${HEIGHT}" fill="${tone.mat}"/><rect width="${WIDTH}" height="${HEIGHT}" filter="url(#grain)" opacity=".5"/>`
}

const wire = (d: string, tone: Tone, mm = 0.7) => `<g fill="none" stroke-linecap="round" stroke-linejoin="round"><path d="${d}" transform="translate(7 11)" stroke="#000" stroke-width="${mm * MM}" opacity=".35" filter="url(#soft)"/>
  <path d="${d}" stroke="${tone.shade}" stroke-width="${mm * MM}"/><path d="${d}" stroke="${tone.metal}" stroke-width="${mm * MM * 0.66}"/><path d="${d}" transform="translate(0 -2)" stroke="#fff" stroke-width="${mm * MM * 0.16}" opacity=".75"/></g>`
const bead = (x: number, y: number, mm: number) => `<ellipse cx="${x + 9}" cy="${y + 14}" rx="${mm * MM / 2}" ry="${mm * MM / 2}" fill="#000" opacity=".35" filter="url(#soft)"/><circle cx="${x}" cy="${y}" r="${mm * MM / 2}" fill="url(#glass)"/>`
const loop = (x: number, y: number, r: number, side: 1 | -1) => `M${x} ${y}A${r} ${r} 0 1 ${side > 0 ? 1 : 0} ${x + side * 0.1} ${y}`

/** One link: bead in the middle, necks with turns, a loop each end. `gap` in millimetres between bead and turns. */
function link(tone: Tone, gap: number, y = 300): string {
  const x = WIDTH / 2
  const b = 4 * MM
  const turns = (side: 1 | -1) => [0, 1, 2].map(i => wire(`M${x + side * (b + gap * MM + 6 + i * 12)} ${y - 15}v30`, tone)).join('')
  const ring = (side: 1 | -1) => { const cx = x + side * (b + gap * MM + 42 + 1.85 * MM); return wire(`M${cx + 1.85 * MM} ${y}A${1.85 * MM} ${1.85 * MM} 0 1 1 ${cx + 1.85 * MM} ${y - 0.1}`, tone) }
  return wire(`M${x - b - 44} ${y}H${x + b + 44}`, tone) + ring(-1) + ring(1) + bead(x, y, 8) + turns(-1) + turns(1)
}

const rings = (tone: Tone) => Array.from({ length: 10 }, (_, i) => { const x = 140 + i % 5 * 165; const y = 190 + Math.floor(i / 5) * 200; return wire(loop(x + 40, y, 40, 1), tone, 1) }).join('')
const strand = (tone: Tone) => Array.from({ length: 11 }, (_, i) => { const x = 70 + i * 82; const y = 330 + Math.sin(i / 2.4) * 60; return (i < 10 ? wire(`M${x} ${y}L${x + 82} ${330 + Math.sin((i + 1) / 2.4) * 60}`, { ...tone, metal: '#efe7d4', shade: '#b9ad93' }, 0.6) : '') + bead(x, y, 4.1) }).join('')
const cap = (tone: Tone) => `${bead(WIDTH / 2, 310, 20)}${[0, 1, 2].map(i => wire(`M${WIDTH / 2 - 60 - i * 26} ${190 + i * 22}A${80 + i * 26} ${30 + i * 8} 0 0 0 ${WIDTH / 2 + 60 + i * 26} ${190 + i * 22}`, tone, 0.9)).join('')}${wire(`M${WIDTH / 2 - 30} 330C${WIDTH / 2 - 130} 330 ${WIDTH / 2 - 120} 430 ${WIDTH / 2 - 50} 420C${WIDTH / 2} 410 ${WIDTH / 2 - 20} 360 ${WIDTH / 2 - 60} 372`, tone, 0.9)}`
const hole = (tone: Tone) => `${bead(WIDTH / 2, 310, 32)}<circle cx="${WIDTH / 2 + 40}" cy="280" r="34" fill="#16110d"/><circle cx="${WIDTH / 2 + 40}" cy="280" r="40" fill="none" stroke="${tone.deep}" stroke-width="6"/>`
const board = (tone: Tone) => `<path d="M40 200H920V420H40Z" fill="#5b5048"/>${Array.from({ length: 14 }, (_, i) => bead(95 + i * 60, 310, 3.4)).join('')}${wire('M60 470H900', { ...tone, metal: '#efe7d4', shade: '#b9ad93' }, 0.6)}`

const SUBJECTS: [Subject, (tone: Tone) => string][] = [['link', tone => link(tone, 0.1)], ['rings', rings], ['strand', strand], ['cap', cap], ['hole', hole], ['board', board], ['link', tone => link(tone, 0.9)]]

/** The photographs, always the same for the same drawing library. */
export async function madePhotographs(count = 12): Promise<MadePhoto[]> {
  const made: MadePhoto[] = []
  for (let i = 0; i < count; i++) {
    const tone = TONES[i % TONES.length]
    const subject = SUBJECTS[i % SUBJECTS.length]
    if (!tone || !subject) continue
    const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="${WIDTH}" height="${HEIGHT}">${ground(tone, i + 3)}${subject[1](tone)}${rule()}<rect width="${WIDTH}" height="${HEIGHT}" fill="url(#lamp)"/></svg>`
    const bytes = await sharp(Buffer.from(svg)).jpeg({ quality: 80 }).toBuffer()
    made.push({ of: subject[0], sha: sha256(bytes), bytes, width: WIDTH, height: HEIGHT })
  }
  return made
}
