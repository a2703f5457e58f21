/** Draws the lessons' pictures into content-src. `--check` only says whether they are as drawn. */
import { existsSync, readFileSync, writeFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { CAP_PICTURES } from './cap.mjs'
import { LINK } from './link.mjs'
import { picture } from './parts.mjs'
import { RINGS } from './rings.mjs'
import { SAFETY } from './safety.mjs'
import { STRAND } from './strand.mjs'

const LESSONS = { 'wrapped-loop-link': LINK, 'jump-rings': RINGS, 'bench-safety': SAFETY, 'hand-knotted-strand': STRAND, 'coiled-bead-cap': CAP_PICTURES }
const isCheck = process.argv.includes('--check')
const other = []
for (const [slug, pictures] of Object.entries(LESSONS)) {
  for (const [name, [title, ...parts]] of Object.entries(pictures)) {
    const path = fileURLToPath(new URL(`../../content-src/lessons/${slug}/${name}.svg`, import.meta.url))
    const svg = picture(title, ...parts)
    if (isCheck) { if (!existsSync(path) || readFileSync(path, 'utf8') !== svg) other.push(`${slug}/${name}.svg`) }
    else writeFileSync(path, svg)
  }
}
if (other.length > 0) {
  process.stdout.write(`Not as drawn: ${other.join(', ')}. Run npm run pictures:draw.\n`)
  process.exit(1)
}
