/** What is not kept goes back to its maker with a reason, and a level of 4 gets its second name. */
import type { Page } from '@playwright/test'
import { awake, comeIn, PASSWORD, person } from './people'
import { expect, test } from './watch'

/** Opens a bag of the looks by its label. */
async function open(page: Page, label: string): Promise<void> {
  await page.goto('/looks')
  await awake(page)
  await page.getByRole('link', { name: new RegExp(label) }).click()
  await expect(page.getByText(`bag ${label}`)).toBeVisible()
}

/** Says no to every line but the measured ones, how it was seen, and that nothing changes. */
async function markAll(page: Page): Promise<void> {
  const lines = page.getByRole('group').filter({ has: page.getByRole('button', { name: 'no', exact: true }) })
  const count = await lines.count()
  for (let i = 0; i < count; i++) {
    const no = lines.nth(i).getByRole('button', { name: 'no', exact: true })
    if (await no.isEnabled()) await no.click()
  }
  const again = page.getByRole('textbox', { name: /^Measure again/ })
  if (await again.count() > 0) await again.fill('0')
  await page.keyboard.press('Escape')
  await page.getByRole('button', { name: /^seen/ }).click()
  await page.getByRole('button', { name: /at hold points/ }).click()
  await page.getByRole('button', { name: /^from now on/ }).click()
  await page.getByRole('button', { name: /As before/ }).click()
}

test('a piece is sent back with its reason, which its maker reads at the bench', async ({ browser }) => {
  const [ruth, kit] = [await person(browser), await person(browser, { width: 1180, height: 820 })]
  const { page } = ruth
  await comeIn(ruth, 'ruth')
  await open(page, 'KIT-JR-4')
  await markAll(page)
  await page.getByRole('button', { name: /^this piece/ }).click()
  await page.getByRole('button', { name: 'Send back …' }).click()
  await expect(page.getByRole('button', { name: 'Send back', exact: true }).first()).toBeDisabled()
  await page.getByRole('textbox', { name: /In a sentence/ }).fill('The joins show. Saw with the coil held on the tape.')
  await page.getByRole('button', { name: 'Send back', exact: true }).first().click()
  await page.getByRole('button', { name: 'Send back', exact: true }).click()
  await expect(page.getByText('KIT-JR-4 is judged.')).toBeVisible()
  await expect(page.getByRole('link', { name: /KIT-JR-4/ })).toHaveCount(0)

  await comeIn(kit, 'kit')
  const notes = kit.page.getByRole('region', { name: 'Notes' })
  await expect(notes).toContainText('The joins show. Saw with the coil held on the tape.')
  await expect(notes).toContainText('KIT-JR-4')
  for (const each of [ruth, kit]) await each.context.close()
})

test('a piece to be mended is taken up again at the step it is made again from', async ({ browser }) => {
  const [ruth, dev] = [await person(browser), await person(browser, { width: 1180, height: 820 })]
  const { page } = ruth
  await comeIn(ruth, 'ruth')
  await open(page, 'DEV-WL-4')
  await markAll(page)
  await page.getByRole('button', { name: /^this piece/ }).click()
  await page.getByRole('button', { name: /To mend It goes back/ }).click()
  await page.getByRole('textbox', { name: /In a sentence/ }).fill('The second neck is bare. Take the turns off and wrap it again.')
  const steps = page.getByLabel('Made again from')
  const step = 'Turn the wire round the second neck'
  await steps.selectOption({ label: step })
  await page.getByRole('button', { name: 'To mend', exact: true }).first().click()
  await page.getByRole('button', { name: 'To mend', exact: true }).click()
  await expect(page.getByText('DEV-WL-4 is judged.')).toBeVisible()

  await comeIn(dev, 'dev')
  const strip = dev.page.getByRole('region', { name: /^DEV-WL-4/ })
  await expect(strip).toContainText(step)
  await strip.getByRole('link', { name: 'Go on' }).click()
  await dev.page.getByRole('button', { name: 'Yes, go on' }).click()
  await expect(dev.page.getByText(step).first()).toBeVisible()
  for (const each of [ruth, dev]) await each.context.close()
})

test('a level of 4 stands on one signature until another gives the second name, and only then on two', async ({ browser }) => {
  const [ruth, imran] = [await person(browser), await person(browser)]
  await comeIn(ruth, 'ruth')
  await ruth.page.goto('/looks/to-sign')
  await expect(ruth.page.getByText('Not you: Yours is the first name.')).toBeVisible()
  await expect(ruth.page.getByRole('button', { name: 'Give the second name' })).toHaveCount(0)

  const { page } = imran
  await comeIn(imran, 'imran')
  await page.goto('/looks/to-sign')
  await awake(page)
  const row = page.getByRole('listitem').filter({ hasText: 'Ben Okoro, Wrapped-loop link' })
  await row.getByLabel(/Your password/).fill('not this one')
  await row.getByRole('button', { name: 'Give the second name' }).click()
  await expect(row.getByRole('alert')).toContainText(/not your password/i)
  await row.getByLabel(/Your password/).fill(PASSWORD)
  await row.getByRole('button', { name: 'Give the second name' }).dblclick()
  await expect(row).toHaveCount(0)
  await page.goto('/classes')
  await awake(page)
  await page.getByRole('link', { name: 'Tuesday evening', exact: true }).click()
  await page.getByRole('button', { name: /^Ben Okoro, Wrapped-loop link: On your own, 4/ }).click()
  await expect(page.getByText(/Imran Sethi/).first()).toBeVisible()
  for (const each of [ruth, imran]) await each.context.close()
})
