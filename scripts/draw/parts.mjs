/** Parts that the lessons' pictures are put together from. One sheet is 660 by 440. Presentation attributes only. */
export const INK = '#1c1a17'
export const BRASS = '#63440a'
export const STEEL = '#2f4654'
export const GARNET = '#8e1b2f'
export const SKIN = '#f0dfc9'
const METAL = '#dfe3e4'
const GLASS = '#dfe8e6'
const WOOD = '#e3cfa4'

export const at = (x, y, turn, ...parts) => `<g transform="translate(${x} ${y})${turn ? ` rotate(${turn})` : ''}">${parts.join('')}</g>`
export const flip = (x, ...parts) => `<g transform="translate(${x * 2} 0) scale(-1 1)">${parts.join('')}</g>`
/** Worked wire. */
export const wire = (d, width = 14, colour = BRASS) => `<path d="${d}" fill="none" stroke="${colour}" stroke-width="${width}" stroke-linecap="round" stroke-linejoin="round"/>`
export const cord = (d, width = 6) => `<path d="${d}" fill="none" stroke="#8b7b5f" stroke-width="${width}" stroke-linecap="round" stroke-linejoin="round"/>`
export const line = (d, width = 2, colour = INK) => `<path d="${d}" fill="none" stroke="${colour}" stroke-width="${width}" stroke-linecap="round" stroke-linejoin="round"/>`
export const steel = (d, fill = METAL) => `<path d="${d}" fill="${fill}" stroke="${STEEL}" stroke-width="2.5" stroke-linejoin="round"/>`
export const bead = (x, y, r) => `<circle cx="${x}" cy="${y}" r="${r}" fill="${GLASS}" stroke="${STEEL}" stroke-width="2.5"/><path d="M${x - r * 0.5} ${y - r * 0.45}A${r * 0.7} ${r * 0.7} 0 0 1 ${x} ${y - r * 0.68}" fill="none" stroke="#fff" stroke-width="${Math.max(2, r * 0.09)}" stroke-linecap="round"/>`
export const hole = (x, y, r) => `<ellipse cx="${x}" cy="${y}" rx="${r}" ry="${r * 0.8}" fill="${INK}"/>`
export const loop = (x, y, r, width = 14) => `<circle cx="${x}" cy="${y}" r="${r}" fill="none" stroke="${BRASS}" stroke-width="${width}"/>`
export const text = (x, y, words, size = 26, colour = INK, anchor = 'middle') => `<text x="${x}" y="${y}" font-size="${size}" font-weight="700" text-anchor="${anchor}" fill="${colour}" font-family="Atkinson Hyperlegible, sans-serif">${words}</text>`
/** The one arrow of a picture. */
export const arrow = (d, tip, turn) => `<path d="${d}" fill="none" stroke="${GARNET}" stroke-width="6" stroke-linecap="round"/><path d="M-16 -13L6 0L-16 13" transform="translate(${tip[0]} ${tip[1]}) rotate(${turn})" fill="none" stroke="${GARNET}" stroke-width="6" stroke-linecap="round" stroke-linejoin="round"/>`
/** The one ring that points at what matters. */
export const look = (x, y, r) => `<circle cx="${x}" cy="${y}" r="${r}" fill="none" stroke="${GARNET}" stroke-width="5"/>`

/** Pliers with their tip at (0, 0), lying to the right. */
const handles = '<path d="M196 -16C270 -40 330 -44 420 -40M196 16C270 40 330 44 420 40" fill="none" stroke="#2f4654" stroke-width="20" stroke-linecap="round"/><path d="M196 -16C270 -40 330 -44 420 -40M196 16C270 40 330 44 420 40" fill="none" stroke="#b9c3c8" stroke-width="14" stroke-linecap="round"/>'
const joint = `<circle cx="186" cy="0" r="30" fill="${METAL}" stroke="${STEEL}" stroke-width="2.5"/><circle cx="186" cy="0" r="8" fill="${STEEL}"/>`
export const roundNose = (gap = 5) => `${handles}${steel(`M0 ${-gap - 5}Q-4 ${-gap - 2} 0 ${-gap}L180 -4V-30L20 ${-gap - 9}Z`)}${steel(`M0 ${gap + 5}Q-4 ${gap + 2} 0 ${gap}L180 4V30L20 ${gap + 9}Z`)}${joint}`
export const flatNose = (gap = 6) => `${handles}${steel(`M0 ${-gap - 12}L0 ${-gap}L180 -4V-34L60 -26Z`)}${steel(`M0 ${gap + 12}L0 ${gap}L180 4V34L60 26Z`)}${joint}`
export const bentNose = (gap = 5) => `${handles}${steel(`M0 ${gap + 30}L-10 ${gap + 22}Q30 ${-gap} 80 ${-gap}L180 -4V-32L70 -30Q10 -24 0 ${gap + 30}Z`)}${steel(`M6 ${gap + 36}Q44 ${gap + 6} 84 ${gap}L180 4V32L90 28Q40 26 18 ${gap + 44}Z`)}${joint}`
export const cutter = (gap = 9) => `${handles}${steel(`M0 ${-gap}L64 -54L150 -44L180 -6L60 ${-gap + 4}Z`)}${steel(`M0 ${gap}L64 54L150 44L180 6L60 ${gap - 4}Z`)}${joint}`
/** A rule with a tick each ten, its zero at (0, 0). */
export const rule = (length = 520, step = 40) => `${steel(`M-10 0H${length}V58H-10Z`, '#f4efe2')}${Array.from({ length: Math.floor(length / step) }, (_, i) => line(`M${i * step} 0v${i % 5 === 0 ? 26 : 16}`, 2)).join('')}`
export const calliper = (open = 70) => `${steel('M-20 -34H420V-2H-20Z')}${steel('M-20 -34H14V120L0 132Z')}${steel(`M${open} -40H${open + 130}V8H${open + 34}L${open + 14} 132L${open} 120Z`)}${Array.from({ length: 16 }, (_, i) => line(`M${open + 150 + i * 14} -30v${i % 5 ? 10 : 18}`, 1.5)).join('')}`
export const saw = () => `${line('M0 0H330', 3, STEEL)}${steel('M-14 -8V-150H344V-8H330V-136H0V-8Z')}${steel('M330 -22H352V24H330Z')}${steel('M352 -12H470V14H352Z', WOOD)}${Array.from({ length: 22 }, (_, i) => line(`M${14 + i * 14} 0l4 5`, 1.5, STEEL)).join('')}`
export const tweezers = (gap = 8) => `${steel(`M0 ${-gap}L30 ${-gap - 6}Q200 -40 360 -10V-2Q190 -22 30 ${-gap}Z`)}${steel(`M0 ${gap}L30 ${gap + 6}Q200 40 360 10V2Q190 22 30 ${gap}Z`)}`
export const needle = () => `${line('M0 0H170', 4, STEEL)}${line('M170 0q20 -10 40 0t40 0', 3, STEEL)}`
export const block = (width = 260, height = 90) => steel(`M0 0H${width / 2 - 26}Q${width / 2} 34 ${width / 2 + 26} 0H${width}V${height}H0Z`, '#d9b98c')
export const bin = () => `${steel('M0 0H190L170 130H20Z', '#c9cdcf')}${line('M-8 0H198', 6, STEEL)}`
export const rod = (length = 460, r = 32) => steel(`M0 ${-r}H${length}Q${length + 12} 0 ${length} ${r}H0Z`)
export const finger = (length = 170) => `<path d="M0 0Q-22 0 -24 -20Q-24 -44 4 -46L${length} -58V10Z" fill="${SKIN}" stroke="${INK}" stroke-width="2.5" stroke-linejoin="round"/><path d="M-16 -34Q-4 -40 10 -38" fill="none" stroke="${INK}" stroke-width="2"/>`
export const loupe = (x, y, r) => `<circle cx="${x}" cy="${y}" r="${r}" fill="none" stroke="${STEEL}" stroke-width="14"/><circle cx="${x}" cy="${y}" r="${r + 8}" fill="none" stroke="${INK}" stroke-width="2"/>`
export const tape = (x, y, width, height) => `<rect x="${x}" y="${y}" width="${width}" height="${height}" fill="#ead9a8" stroke="${BRASS}" stroke-width="2"/>`
export const dimension = (x1, x2, y, words) => `${line(`M${x1} ${y - 12}v24M${x2} ${y - 12}v24M${x1} ${y}H${x2}`)}${text((x1 + x2) / 2, y - 16, words, 28, BRASS)}`
/** Coil of wire seen from the side, n turns from x on, radius r. */
export const turns = (x, y, n, r, pitch = 15, width = 14) => Array.from({ length: n }, (_, i) => wire(`M${x + i * pitch} ${y - r}L${x + i * pitch + 5} ${y + r}`, width)).join('')
/** Flat spiral out from (x, y); `way` 1 or -1. */
export const scroll = (x, y, n, way = 1, pitch = 18, width = 13) => {
  const points = Array.from({ length: Math.round(n * 24) + 1 }, (_, i) => { const t = i / 24 * 2 * Math.PI; const r = 8 + pitch * i / 24; return `${(x + way * r * Math.cos(t)).toFixed(1)} ${(y + r * Math.sin(t)).toFixed(1)}` })
  return wire(`M${points.join('L')}`, width)
}
export const picture = (title, ...parts) => `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 660 440" role="img" aria-label="${title}"><title>${title}</title>${parts.join('')}</svg>\n`
