import { expect, test } from './watch'

/** As the demo studio is loaded (server/db/seed). */
const RUTH = { email: 'ruth@tallow-yard.example', password: 'third hand bench' }

test('a piece is judged with the keyboard alone, from its label to the gathered signatures', async ({ page }) => {
  expect((await page.request.post('/api/come-in', { data: RUTH })).ok()).toBe(true)
  await page.goto('/looks', { waitUntil: 'networkidle' })

  await page.keyboard.type('LEILA-WL')
  await expect(page.getByRole('link', { name: /LEILA-WL-4/ })).toBeFocused()
  await page.keyboard.press('Enter')
  await expect(page.getByRole('heading', { name: /^Leila Aziz, Wrapped-loop link$/ })).toBeVisible()
  await page.waitForLoadState('networkidle')

  // Nothing is marked beforehand.
  await expect(page.locator('[data-mark][aria-pressed="true"]')).toHaveCount(0)
  const lines = await page.locator('[data-line]').filter({ has: page.locator('button:enabled, input') }).count()
  for (let i = 0; i < lines; i++) {
    await page.keyboard.press('ArrowDown')
    const isMeasure = await page.evaluate(() => document.activeElement instanceof HTMLInputElement)
    if (isMeasure) await page.keyboard.type('4.4')
    else {
      await page.keyboard.press('3')
      if (i < lines - 1) await page.keyboard.press('ArrowUp')
    }
  }
  await page.keyboard.press('p')
  await page.keyboard.press('1')
  await page.keyboard.press('s')
  await page.keyboard.press('2')
  await page.keyboard.press('l')
  // The level held already is shut, with the reason.
  await expect(page.getByRole('button', { name: /With me in the room, 3.*Leila holds this already\./ })).toHaveAttribute('aria-disabled', 'true')
  await page.keyboard.press('0')
  await page.keyboard.press('w')
  await page.keyboard.type('Neck cleaner than last time.')
  await page.keyboard.press('Escape')
  await page.keyboard.press('Tab')
  await page.keyboard.press('Enter')

  await expect(page.getByText('LEILA-WL-4 is judged.')).toBeVisible()
  await expect(page.getByRole('link', { name: /LEILA-WL-4/ })).toHaveCount(0)
  await expect(page.getByRole('link', { name: /^To sign \(\d+\)$/ })).toBeVisible()
})
