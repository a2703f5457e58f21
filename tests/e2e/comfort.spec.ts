/** Text twice as large, a left hand: the same lesson, all of it within reach of a pedal. */
import { awake, comeIn, pedal, person } from './people'
import { expect, test } from './watch'

test('much enlarged, a pedal alone reads a step to its end before the next one comes', async ({ browser }) => {
  const marcus = await person(browser, { width: 1180, height: 820 })
  const { page } = marcus
  await comeIn(marcus, 'marcus')
  await page.getByRole('link', { name: 'Go on' }).first().click()
  await page.getByRole('button', { name: 'Yes, go on' }).click()
  const title = page.getByRole('heading', { level: 1 })
  const first = await title.innerText()
  await expect(page.getByRole('button', { name: 'Read on' })).toBeVisible()
  const end = page.locator('.bench-say > *').last()
  const isRead = () => end.evaluate((element) => {
    const foot = document.querySelector('.bench-foot')?.getBoundingClientRect().top ?? 0
    return element.getBoundingClientRect().bottom <= foot + 24
  })
  expect(await isRead()).toBe(false)
  for (let i = 0; i < 8 && !await isRead(); i++) {
    await pedal(page, 'PageDown')
    await expect(title).toHaveText(first)
  }
  expect(await isRead()).toBe(true)
  await pedal(page, 'PageDown')
  await expect(title).not.toHaveText(first)
  // Nothing hangs over the side of the sheet.
  expect(await page.evaluate(() => document.documentElement.scrollWidth - innerWidth)).toBeLessThanOrEqual(0)
  await marcus.context.close()
})

test('four times enlarged, most of the sheet is for what is said, and Help now stays in its corner', async ({ browser }) => {
  const hana = await person(browser, { width: 1180, height: 820 })
  const { page, context } = hana
  await comeIn(hana, 'hana')
  const base = String(process.env.TEST_BASE_URL)
  const choose = (textSize: number) => context.request.patch(`${base}/api/me`, { data: { textSize, hand: 'left', ground: 'paper' }, headers: { 'origin': base, 'sec-fetch-site': 'same-origin' } })
  expect((await choose(400)).ok()).toBe(true)
  await page.goto('/bench')
  const help = page.getByRole('button', { name: 'Help now' })
  await expect(help).toBeInViewport({ ratio: 1 })
  await page.getByRole('link', { name: 'Go on' }).first().click()
  await page.getByRole('button', { name: 'Yes, go on' }).click()
  await expect(help).toBeInViewport({ ratio: 1 })
  const share = await page.locator('.bench-main').evaluate(element => element.clientHeight / innerHeight)
  expect(share).toBeGreaterThan(0.7)
  expect((await choose(100)).ok()).toBe(true)
  await context.close()
})

test('for a left hand a picture that may turn over does, and what is fixed does not', async ({ browser }) => {
  // Both are left-handed (server/db/seed): Ben threads a strand, Hana lays a scroll, whose way round is fixed.
  for (const [key, turns] of [['ben', true], ['hana', false]] as const) {
    const { context, page, ...who } = await person(browser, { width: 1180, height: 820 })
    await comeIn({ context, page, ...who }, key)
    await page.getByRole('link', { name: 'Go on' }).first().click()
    await page.getByRole('button', { name: 'Yes, go on' }).click()
    const picture = page.locator('img.lesson-picture')
    await expect(page.getByRole('heading', { level: 1 })).toBeVisible()
    await awake(page)
    for (let back = 0; back < 6 && await picture.count() === 0; back++) await pedal(page, 'PageUp')
    await expect(picture).toBeVisible()
    expect(await picture.evaluate(image => getComputedStyle(image).transform === 'matrix(-1, 0, 0, 1, 0, 0)')).toBe(turns)
    await context.close()
  }
})
