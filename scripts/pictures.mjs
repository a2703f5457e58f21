/**
 * Takes the pictures of README.md from the running product: `npm run pictures` while the demo runs (BASE_URL, usual
 * http://localhost:3000). It only looks, but for taking up a piece that lies on the bench.
 */
import { mkdirSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { chromium } from '@playwright/test'

const base = process.env.BASE_URL ?? 'http://localhost:3000'
const folder = fileURLToPath(new URL('../docs/pictures/', import.meta.url))
mkdirSync(folder, { recursive: true })
const browser = await chromium.launch({ executablePath: '/usr/bin/chromium', args: ['--no-sandbox', '--disable-gpu', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync'] })

/** A browser of one of the demo's people. */
async function as(key, width, height) {
  const context = await browser.newContext({ viewport: { width, height }, locale: 'en-GB' })
  const answer = await context.request.post(`${base}/api/come-in`, { data: { email: `${key}@tallow-yard.example`, password: 'third hand bench' }, headers: { 'origin': base, 'sec-fetch-site': 'same-origin' } })
  if (!answer.ok()) throw new Error(`${key} could not come in: ${await answer.text()}`)
  return { context, page: await context.newPage() }
}
const shoot = (page, name) => page.screenshot({ path: `${folder}${name}.png` })

const { context: office, page } = await as('ruth', 1360, 900)
await page.goto(`${base}/lessons/wrapped-loop-link/write?line=215`, { waitUntil: 'networkidle' })
await shoot(page, 'write')
await page.goto(`${base}/looks`, { waitUntil: 'networkidle' })
await page.getByRole('link', { name: /DEV-WL/ }).first().click()
await page.getByText('bag DEV-WL').waitFor()
await page.waitForLoadState('networkidle')
await shoot(page, 'judge')
await page.goto(`${base}/classes`, { waitUntil: 'networkidle' })
await page.getByRole('link', { name: /Tuesday evening/ }).first().click()
await page.getByRole('heading', { level: 1, name: 'Tuesday evening' }).waitFor()
await page.waitForLoadState('networkidle')
await shoot(page, 'class')
await office.close()

const { page: bench } = await as('isaac', 1180, 820)
await bench.goto(`${base}/bench`, { waitUntil: 'networkidle' })
await shoot(bench, 'home')
await bench.getByRole('link', { name: /Go on/ }).first().click()
await bench.getByRole('button', { name: 'Yes, go on' }).click()
await bench.getByText('HOLD POINT', { exact: true }).waitFor()
await bench.waitForLoadState('networkidle')
await shoot(bench, 'bench')
await browser.close()
