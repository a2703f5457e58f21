/** From a letter or a card to the bench, in a real browser. */
import AxeBuilder from '@axe-core/playwright'
import type { Page } from '@playwright/test'
import { expect, test } from './watch'

const PASSWORD = 'third hand bench'
const emailOf = (key: string) => `${key}@tallow-yard.example`

async function comeIn(page: Page, key: string, at = '/come-in'): Promise<void> {
  await page.goto(at)
  await page.getByLabel('E-mail').fill(emailOf(key))
  await page.getByLabel('Password').fill(PASSWORD)
  await page.getByRole('button', { name: 'Come in' }).click()
}

async function isFair(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page }).analyze()
  expect(violations.map(one => `${one.id}: ${one.nodes.map(node => node.target.join(' ')).join(', ')}`)).toEqual([])
}

test('a person comes in where they wanted to go, and leaves', async ({ page }) => {
  await page.goto('/people')
  await expect(page).toHaveURL(/\/come-in\?next=\/people$/)
  await expect(page.getByRole('heading', { name: 'Who are you?' })).toBeVisible()
  await isFair(page)
  await page.getByLabel('E-mail').fill(emailOf('owen'))
  await page.getByLabel('Password').fill('not this one')
  await page.getByRole('button', { name: 'Come in' }).click()
  await expect(page.getByRole('alert').filter({ hasText: 'do not go together' })).toBeVisible()
  await expect(page.getByLabel('E-mail')).toHaveValue(emailOf('owen'))
  await page.getByLabel('Password').fill(PASSWORD)
  await page.getByRole('button', { name: 'Come in' }).click()
  await expect(page).toHaveURL(/\/people$/)
  await expect(page.getByRole('link', { name: 'Amy Brandt' })).toBeVisible()
  await isFair(page)
  await page.getByRole('button', { name: 'finished' }).click()
  await expect(page).toHaveURL(/\/come-in$/)
  await page.goBack()
  await page.goto('/people')
  await expect(page.getByRole('heading', { name: 'Who are you?' })).toBeVisible()
})

test('an address that leads elsewhere leads home', async ({ page, baseURL }) => {
  await comeIn(page, 'owen', '/come-in?next=//elsewhere.example/x')
  await expect(page.getByRole('heading', { name: 'Owen Tait' })).toBeVisible()
  expect(new URL(page.url()).origin).toBe(baseURL)
})

test('an invitation goes by letter to a new person, who is then in the class', async ({ page, browser }) => {
  await comeIn(page, 'owen', '/come-in?next=/people')
  await page.getByRole('button', { name: 'Ask someone in' }).click()
  const dialog = page.getByRole('dialog', { name: 'Ask someone in' })
  await dialog.getByRole('button', { name: 'Take in, without a letter' }).click()
  await expect(dialog.getByText('Missing: name.')).toBeVisible()
  const name = `Nell Hart ${Date.now().toString(36)}`
  const email = `nell.${Date.now().toString(36)}@letters.example`
  await dialog.getByLabel('Name').fill(name)
  await dialog.getByLabel('E-mail').fill(email)
  await dialog.getByLabel('Class', { exact: true }).selectOption({ label: 'Tuesday evening' })
  await isFair(page)
  await dialog.getByRole('button', { name: 'Send the letter' }).click()
  await expect(page.getByRole('heading', { name: 'Asked, and not come yet' })).toBeVisible()

  const other = await (await browser.newContext()).newPage()
  await expect(async () => {
    await other.goto('/mail')
    await expect(other.getByText(`to ${email}`)).toBeVisible({ timeout: 1000 })
  }).toPass()
  await other.getByRole('article').filter({ hasText: email }).getByRole('link').click()
  await expect(other.getByRole('heading', { name: 'Welcome to Tallow Yard Bench School' })).toBeVisible()
  await expect(other.getByLabel('Your name')).toHaveValue(name)
  await isFair(other)
  await other.getByLabel('A password', { exact: true }).fill('password1')
  await other.getByRole('button', { name: 'Come in' }).click()
  await expect(other.getByText('Too many people use this one.')).toBeVisible()
  await other.getByLabel('A password', { exact: true }).fill('nine copper rivets')
  await other.getByRole('button', { name: 'Come in' }).click()
  await expect(other).toHaveURL(/\/bench$/)
  await other.context().close()
  await page.reload()
  await expect(page.getByRole('link', { name })).toBeVisible()
})

test('a start card is printed, and lets in who has no e-mail', async ({ page, browser }) => {
  await comeIn(page, 'owen', '/come-in?next=/people')
  await page.getByRole('button', { name: 'Ask someone in' }).click()
  const name = `Wil Card ${Date.now().toString(36)}`
  await page.getByRole('dialog').getByLabel('Name').fill(name)
  await page.getByRole('dialog').getByLabel('Class', { exact: true }).selectOption({ label: 'Tuesday evening' })
  await page.getByRole('button', { name: 'Take in, without a letter' }).click()
  await expect(page.getByRole('link', { name })).toBeVisible()

  await page.getByRole('link', { name: 'Classes' }).first().click()
  await page.getByRole('link', { name: 'Start cards of Tuesday evening' }).click()
  await expect(page.getByLabel(name)).toBeVisible()
  for (const box of await page.getByRole('checkbox').all()) await box.uncheck()
  await page.getByLabel(name).check()
  await page.getByRole('button', { name: 'Make one card' }).click()
  const code = await page.locator('[data-code]').innerText()
  expect(code).toMatch(/^[2-9B-Z]{4}-[2-9B-Z]{4}$/)
  await page.emulateMedia({ media: 'print' })
  await expect(page.getByRole('button', { name: 'Print the sheet' })).toBeHidden()
  await expect(page.locator('[data-code]')).toBeVisible()

  const tablet = await (await browser.newContext()).newPage()
  await tablet.goto('/come-in')
  await tablet.getByRole('link', { name: 'I have a card' }).click()
  await isFair(tablet)
  await tablet.getByLabel('Code on the card').fill('2345-bcdf')
  await tablet.getByRole('button', { name: 'Come in' }).click()
  await expect(tablet.getByText('This card is not known')).toBeVisible()
  await tablet.getByLabel('Code on the card').fill(code.toLowerCase())
  await tablet.getByRole('button', { name: 'Come in' }).click()
  await expect(tablet).toHaveURL(/\/bench$/)
  await tablet.context().close()
})

test('a class is made and filled; parts are given and ended', async ({ page }) => {
  await comeIn(page, 'owen', '/come-in?next=/classes')
  await page.getByRole('button', { name: 'Make a class' }).click()
  const name = `Friday bench ${Date.now().toString(36)}`
  const dialog = page.getByRole('dialog')
  await dialog.getByLabel('Name').fill(name)
  await dialog.getByLabel('Day').selectOption({ label: 'Friday' })
  await dialog.getByLabel('Term from').fill('2026-01-09')
  await dialog.getByLabel('Term to').fill('2026-12-18')
  await dialog.getByRole('button', { name: 'Make it' }).click()
  await page.getByRole('link', { name: `People and lessons of ${name}` }).click()
  await page.getByLabel('Put in the class').selectOption({ label: 'Amy Brandt' })
  await page.getByRole('region', { name: 'People' }).getByRole('button', { name: 'Put in' }).click()
  await expect(page.getByRole('button', { name: 'Take out Amy Brandt' })).toBeVisible()
  await isFair(page)
  await page.getByRole('link', { name: 'Amy Brandt' }).click()
  await page.getByRole('button', { name: 'Make assessor' }).click()
  await expect(page.getByText('Assessor given, by Owen Tait')).toBeVisible()
  await page.getByRole('button', { name: 'End: assessor' }).click()
  await expect(page.getByText('Assessor ended, by Owen Tait')).toBeVisible()
  await isFair(page)
})

test('the page of caught letters shows text only and fetches nothing from elsewhere', async ({ page }) => {
  await page.goto('/come-in/forgotten')
  await page.getByLabel('E-mail').fill(emailOf('leila'))
  await page.getByRole('button', { name: 'Send the letter' }).click()
  await expect(page.getByText('a letter is on its way')).toBeVisible()
  await isFair(page)
  await expect(async () => {
    await page.goto('/mail')
    await expect(page.getByText(`to ${emailOf('leila')}`)).toBeVisible({ timeout: 1000 })
  }).toPass()
  await page.getByRole('article').filter({ hasText: emailOf('leila') }).first().getByRole('link').click()
  await expect(page.getByRole('heading', { name: 'Choose a password' })).toBeVisible()
})
