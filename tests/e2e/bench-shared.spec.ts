/** A piece that is not at one tablet alone: taken up elsewhere, witnessed and looked at from the room. */
import type { Page } from '@playwright/test'
import { ulid } from 'ulid'
import { hookLesson } from './hook-lesson'
import { ask, comeIn, lessonInClass, person } from './people'
import { expect, test } from './watch'

const titleOf = (words: string) => `${words} ${ulid().slice(-4)}`
const at = (page: Page, step: string) => expect(page.getByRole('heading', { level: 1, name: step })).toBeVisible()

/** A tap lights the choice, and a second one, elsewhere, says it. */
async function say(page: Page, choice: string): Promise<void> {
  await page.getByRole('button', { name: choice, exact: true }).click()
  await page.getByRole('button', { name: `press here to say ${choice}` }).click()
}

test('a piece goes on at its exact step on another tablet, and waits there for an instructor in the room', async ({ browser }) => {
  test.setTimeout(180_000)
  const [ruth, owen, amy, second] = [await person(browser), await person(browser), await person(browser, { width: 1180, height: 820 }), await person(browser, { width: 768, height: 1024 })]
  const title = titleOf('Shared hook')
  await comeIn(ruth, 'ruth')
  await comeIn(owen, 'owen')
  await lessonInClass(ruth, owen, title, hookLesson(title, { witnessed: true }))

  await comeIn(amy, 'amy')
  await amy.page.getByRole('link', { name: new RegExp(title) }).click()
  await amy.page.getByRole('button', { name: 'Begin the piece' }).click()
  await say(amy.page, 'Under a finger, over the bin')
  await at(amy.page, 'Cut to length')
  await amy.page.keyboard.press('PageDown')
  await expect(amy.page.getByRole('heading', { name: 'Which way does the hook open?' })).toBeVisible()
  await expect(amy.page.getByText('Kept here and sent')).toBeVisible()

  // The other tablet knows the step; nothing of it was there before.
  await comeIn(second, 'amy')
  const strip = second.page.getByRole('region', { name: new RegExp(title) })
  await expect(strip).toContainText('Step 2 of 3: Bend the hook')
  await strip.getByRole('link', { name: 'Go on' }).click()
  await expect(second.page.getByText('Step 2 of 3: Bend the hook')).toBeVisible()
  await second.page.getByRole('button', { name: 'Yes, go on' }).click()
  await say(second.page, 'Away from the loop')
  await expect(second.page.getByRole('heading', { name: 'Answered. Now an instructor looks at this.' })).toBeVisible()
  await second.page.getByRole('button', { name: 'Ask for a look' }).click()
  await expect(second.page.getByText('You asked for a look.')).toBeVisible()
  // No key passes it.
  for (const key of ['PageDown', 'Enter', 'PageDown']) await second.page.keyboard.press(key)
  await expect(second.page.getByRole('heading', { name: 'Answered. Now an instructor looks at this.' })).toBeVisible()

  await ruth.page.goto('/bench/room')
  const row = ruth.page.getByRole('article', { name: `Amy Brandt, ${title}` })
  await expect(row).toContainText('waits at a hold')
  await row.getByRole('button', { name: 'Witness' }).click()
  await expect(row.getByRole('button', { name: 'Witness' })).toBeHidden()
  // Both tablets hear of it by themselves.
  await at(second.page, 'Bend the hook')
  await at(amy.page, 'Bend the hook')

  // A look's words wait until the piece is down; a reason that was refused is still there.
  await row.getByRole('button', { name: 'Give the look' }).click()
  await row.getByRole('textbox').fill('The bend is even. Keep the jaw at the same mark.')
  await ruth.page.context().setOffline(true)
  await row.getByRole('button', { name: 'The look is given' }).click()
  await expect(ruth.page.getByRole('alert').filter({ hasText: 'The studio cannot be reached' })).toBeVisible()
  await expect(row.getByRole('textbox')).toHaveValue('The bend is even. Keep the jaw at the same mark.')
  await ruth.page.context().setOffline(false)
  await row.getByRole('button', { name: 'The look is given' }).click()
  await expect(row.getByRole('button', { name: 'Give the look' })).toBeHidden()
  await expect(second.page.getByText('The bend is even.')).toBeHidden()
  await second.page.goto('/bench')
  await expect(second.page.getByText('The bend is even. Keep the jaw at the same mark.')).toBeVisible()

  for (const each of [ruth, owen, amy, second]) await each.context.close()
})

test('the network goes and comes back in mid-piece, and nothing done meanwhile is lost', async ({ browser }) => {
  test.setTimeout(120_000)
  const [ruth, owen, carla] = [await person(browser), await person(browser), await person(browser, { width: 1180, height: 820 })]
  const title = titleOf('Cut-off hook')
  await comeIn(ruth, 'ruth')
  await comeIn(owen, 'owen')
  await lessonInClass(ruth, owen, title, hookLesson(title))
  await comeIn(carla, 'amy')
  const { page } = carla
  await page.getByRole('link', { name: new RegExp(title) }).click()
  await page.getByRole('button', { name: 'Begin the piece' }).click()
  await expect(page.getByText('Kept here and sent')).toBeVisible()

  await carla.context.setOffline(true)
  await say(page, 'Into the room')
  await expect(page.getByText('It flies into an eye. Put a finger on it.')).toBeVisible()
  await say(page, 'Under a finger, over the bin')
  await at(page, 'Cut to length')
  await page.keyboard.press('PageDown')
  await at(page, 'Bend the hook')
  await expect(page.getByText(/Kept here\b(?! and sent)/).first()).toBeVisible()
  const piece = new URL(page.url()).pathname.split('/').at(-1)
  const kinds = async () => JSON.stringify((await ask(carla, 'GET', `/api/pieces/${piece}/events`)).body)

  await carla.context.setOffline(false)
  await expect(page.getByText('Kept here and sent')).toBeVisible({ timeout: 30_000 })
  expect(await kinds()).toContain('step.done')
  await page.reload()
  await page.getByRole('button', { name: 'Yes, go on' }).click()
  await at(page, 'Bend the hook')
  for (const each of [ruth, owen, carla]) await each.context.close()
})
