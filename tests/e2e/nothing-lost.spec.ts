/** Bad input, a session that ended and a press too many: each gets a sentence, and nothing typed is lost. */
import { randomFillSync } from 'node:crypto'
import type { Page } from '@playwright/test'
import sharp from 'sharp'
import { ulid } from 'ulid'
import { hookLesson } from './hook-lesson'
import { ask, awake, comeIn, lessonInClass, PASSWORD, pedal, person, type Person } from './people'
import { expect, test } from './watch'

/** The session ends in mid-form, as at the end of an evening: elsewhere, unseen by the page. */
async function endSession({ context }: Person): Promise<void> {
  const base = String(process.env.TEST_BASE_URL)
  const answer = await context.request.post(`${base}/api/finished`, { headers: { 'origin': base, 'sec-fetch-site': 'same-origin' } })
  expect(answer.ok()).toBe(true)
}

/** Comes in again on the page that asks who it is. */
async function sayWho(page: Page, key: string): Promise<void> {
  await expect(page.getByRole('heading', { name: 'Who are you?' })).toBeVisible()
  await awake(page)
  await page.getByLabel('E-mail').fill(`${key}@tallow-yard.example`)
  await page.getByLabel('Password').fill(PASSWORD)
  await page.getByRole('button', { name: 'Come in' }).click()
}

test('a form comes back filled after its session has ended', async ({ browser }) => {
  const owen = await person(browser)
  const { page } = owen
  await comeIn(owen, 'owen')
  await page.goto('/people')
  await awake(page)
  await page.getByRole('button', { name: 'Ask someone in' }).click()
  const dialog = page.getByRole('dialog', { name: 'Ask someone in' })
  const name = `Tam Reed ${ulid().slice(-4)}`
  await dialog.getByLabel('Name').fill(name)
  await dialog.getByLabel('Age', { exact: true }).selectOption({ label: '16 or 17' })
  await endSession(owen)
  await dialog.getByRole('button', { name: 'Take in, without a letter' }).click()
  await expect(dialog.getByText('Say who you are again. What you said is kept here.')).toBeVisible()
  await dialog.getByRole('link', { name: 'Come in' }).click()
  await sayWho(page, 'owen')
  await expect(page).toHaveURL(/\/people$/)
  await page.getByRole('button', { name: 'Ask someone in' }).click()
  await expect(dialog.getByLabel('Name')).toHaveValue(name)
  await expect(dialog.getByLabel('Age', { exact: true }).locator('option:checked')).toHaveText('16 or 17')
  await dialog.getByRole('button', { name: 'Take in, without a letter' }).click()
  await expect(page.getByRole('link', { name })).toBeVisible()
  await owen.context.close()
})

test('a half-written lesson outlives its session, a reload and a wrong picture', async ({ browser }) => {
  const ruth = await person(browser)
  const { page } = ruth
  await comeIn(ruth, 'ruth')
  await page.goto('/lessons/new')
  await awake(page)
  await page.getByLabel('Title').fill(`Half written ${ulid().slice(-4)}`)
  await page.getByRole('radio', { name: 'Wire', exact: true }).check()
  await page.getByRole('button', { name: 'Begin writing' }).click()
  const text = page.getByRole('textbox', { name: 'The lesson as text' })
  await expect(text).toBeVisible()
  await endSession(ruth)
  await text.press('ControlOrMeta+End')
  await text.pressSequentially('\n## A step that is not lost\n')
  await expect(page.getByText('Say who you are again.')).toBeVisible()
  await page.reload()
  await sayWho(page, 'ruth')
  await expect(text).toHaveValue(/## A step that is not lost/)
  await expect(page.getByText(/kept \d/).first()).toBeVisible()

  await page.getByRole('button', { name: 'Pictures' }).click()
  await page.getByLabel('Choose pictures').setInputFiles({ name: 'bend.jpg', mimeType: 'image/jpeg', buffer: Buffer.from('This is a letter, and no picture.') })
  await expect(page.getByRole('alert')).toContainText('bend.jpg')
  await expect(text).toHaveValue(/## A step that is not lost/)
  await ruth.context.close()
})

test('what is marked on a piece outlives its session', async ({ browser }) => {
  const ruth = await person(browser)
  const { page } = ruth
  await comeIn(ruth, 'ruth')
  await page.goto('/looks')
  await awake(page)
  await page.getByRole('region', { name: /^In bags/ }).getByRole('link').first().click()
  const yes = page.getByRole('button', { name: 'yes', exact: true }).first()
  await yes.click()
  await expect(yes).toHaveAttribute('aria-pressed', 'true')
  await page.keyboard.press('w')
  await page.getByRole('textbox', { name: /^A word to/ }).fill('The neck is even all the way.')
  await endSession(ruth)
  await page.reload()
  await sayWho(page, 'ruth')
  await expect(yes).toHaveAttribute('aria-pressed', 'true')
  await expect(page.getByRole('button', { name: /^a word to/ })).toContainText('The neck is even all the way.')
  await ruth.context.close()
})

test('a photo of more than 20 MB is made small on the tablet, a file that is no photo gets a sentence', async ({ browser }) => {
  test.setTimeout(120_000)
  const [ruth, owen] = [await person(browser), await person(browser)]
  const title = `Photo hook ${ulid().slice(-4)}`
  await comeIn(ruth, 'ruth')
  await comeIn(owen, 'owen')
  await lessonInClass(ruth, owen, title, hookLesson(title))
  const amy = await person(browser, { width: 1180, height: 820 })
  await amy.context.clearPermissions()
  const { page } = amy
  await comeIn(amy, 'amy')
  await page.getByRole('link', { name: new RegExp(title) }).click()
  await page.getByRole('button', { name: 'Begin the piece' }).click()
  await page.getByRole('button', { name: 'Under a finger, over the bin', exact: true }).click()
  await page.getByRole('button', { name: /press here to say Under a finger/ }).click()
  for (const step of ['Cut to length', 'Bend the hook']) {
    await expect(page.getByRole('heading', { level: 1, name: step })).toBeVisible()
    await pedal(page, 'PageDown')
  }
  await expect(page.getByRole('heading', { level: 1, name: /Hook, across/ })).toBeVisible()
  await page.keyboard.type('10.4')
  await pedal(page, 'Enter')
  await pedal(page, 'PageDown')
  await expect(page.getByRole('heading', { level: 1, name: 'Look at it' })).toBeVisible()
  await pedal(page, 'PageDown')

  const file = page.getByLabel('A photo that was taken')
  await file.setInputFiles({ name: 'list.pdf', mimeType: 'application/pdf', buffer: Buffer.from('%PDF-1.4') })
  await expect(page.getByText('This is not a photo that can be read here.')).toBeVisible()
  await file.setInputFiles({ name: 'broken.jpg', mimeType: 'image/jpeg', buffer: Buffer.from('no picture at all') })
  await expect(page.getByText('This is not a photo that can be read here.')).toBeVisible()
  const [width, height] = [3400, 3000]
  const big = await sharp(randomFillSync(Buffer.alloc(width * height * 3)), { raw: { width, height, channels: 3 } }).jpeg({ quality: 100, chromaSubsampling: '4:4:4' }).toBuffer()
  expect(big.length).toBeGreaterThan(20_000_000)
  await file.setInputFiles({ name: 'hook.jpg', mimeType: 'image/jpeg', buffer: big })
  await page.getByRole('button', { name: 'Use this photo' }).click({ timeout: 30_000 })
  await expect(page.getByText('Kept here and sent')).toBeVisible({ timeout: 20_000 })
  const piece = new URL(page.url()).pathname.split('/').at(-1)
  await expect.poll(async () => JSON.stringify((await ask(amy, 'GET', `/api/pieces/${piece}/events`)).body)).toContain('"width":1600')
  for (const each of [ruth, owen, amy]) await each.context.close()
})
