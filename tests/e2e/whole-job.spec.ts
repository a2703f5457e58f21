import { expect, test } from '@playwright/test'
import { ulid } from 'ulid'
import { hookLesson } from './hook-lesson'
import { ask, awake, comeIn, pedal, person, pressOn, tabTo, typeInto } from './people'

/** Walks on with short presses until this is the one that is lit. */
async function light(page: import('@playwright/test').Page, name: string): Promise<void> {
  const target = page.getByRole('button', { name, exact: true })
  await expect(target).toBeVisible()
  for (let i = 0; i < 10; i++) {
    if (await target.evaluate(element => element.classList.contains('stop-lit'))) return
    await pedal(page, 'PageDown')
  }
  throw new Error(`${name} was never lit`)
}

test('the whole job, by keyboard alone: write, make, judge, sign, review', async ({ browser }) => {
  test.setTimeout(240_000)
  const title = `Ear wire hook ${ulid().slice(-4)}`
  const slug = title.toLowerCase().replaceAll(' ', '-')
  const ruth = await person(browser)
  const owen = await person(browser)
  const amy = await person(browser, { width: 1180, height: 820 })

  await test.step('an instructor writes a lesson with a hold point and puts it into use', async () => {
    await comeIn(ruth, 'ruth')
    const { page } = ruth
    await page.goto('/lessons/new')
    await awake(page)
    await typeInto(page, page.getByLabel('Title'), title)
    await tabTo(page, page.getByRole('radio', { name: 'Wire', exact: true }))
    await page.keyboard.press('Space')
    await pressOn(page, page.getByRole('button', { name: 'Begin writing' }))
    await page.waitForURL(`**/lessons/${slug}/write`)
    await typeInto(page, page.getByRole('textbox', { name: 'The lesson as text' }), hookLesson(title).replace('piece: one hook', 'piece one hook'))
    await expect(page.getByText(/error/i).first()).toBeVisible()
    await typeInto(page, page.getByRole('textbox', { name: 'The lesson as text' }), hookLesson(title))
    await expect(page.getByText(/kept \d/).first()).toBeVisible()
    await pressOn(page, page.getByRole('button', { name: /Put into use/ }))
    await page.waitForURL('**/use')
    await pressOn(page, page.getByRole('button', { name: 'Put revision 1 into use' }))
    await page.waitForURL(`**/lessons/${slug}`)
    await expect(page.getByRole('heading', { level: 1, name: title })).toBeVisible()
  })

  await test.step('the manager puts it into the class and founds its first teacher', async () => {
    await comeIn(owen, 'owen')
    const lessons = await ask(ruth, 'GET', '/api/lessons')
    const lesson = JSON.stringify(lessons.body).match(new RegExp(`"id":"([0-9A-Z]{26})","slug":"${slug}"`))?.[1] ?? ''
    expect(lesson).not.toBe('')
    const classes = await ask(owen, 'GET', '/api/classes')
    const evening = JSON.stringify(classes.body).match(/"id":"([0-9A-Z]{26})"[^{}]*"name":"Tuesday evening"/)?.[1] ?? ''
    expect((await ask(owen, 'POST', `/api/classes/${evening}/lessons`, { id: ulid(), lessonId: lesson })).status).toBeLessThan(300)
    const me = await ask(ruth, 'GET', '/api/me')
    const teacher = JSON.stringify(me.body).match(/"person":\{"id":"([0-9A-Z]{26})"/)?.[1] ?? ''
    expect((await ask(owen, 'POST', '/api/sign-offs/founding', { id: ulid(), person: teacher, lesson, level: 5, password: 'third hand bench' })).status).toBe(201)
  })

  const label = await test.step('an apprentice is held, answers wrong, then right, measures, photographs, clears the list', async () => {
    await comeIn(amy, 'amy')
    const { page } = amy
    await page.waitForURL('**/bench')
    await pressOn(page, page.getByRole('link', { name: new RegExp(title) }))
    await expect(page.getByRole('heading', { name: 'What is on your bench?' })).toBeVisible()
    await pressOn(page, page.getByRole('button', { name: 'Begin the piece' }))
    await expect(page.getByText('HOLD POINT', { exact: true })).toBeVisible()
    // Going on does not pass it.
    await pedal(page, 'PageDown')
    await expect(page.getByRole('heading', { name: 'Where does the offcut go?' })).toBeVisible()
    await light(page, 'Into the room')
    await pedal(page, 'Enter')
    await expect(page.getByText('It flies into an eye. Put a finger on it.')).toBeVisible()
    await light(page, 'Under a finger, over the bin')
    await pedal(page, 'Enter')
    await expect(page.getByRole('heading', { level: 1, name: 'Cut to length' })).toBeVisible()
    await expect(page.getByText('WARNING')).toBeVisible()
    await expect(page.getByText('HOLD POINT', { exact: true })).toBeHidden()
    await pedal(page, 'PageDown')
    await expect(page.getByRole('heading', { level: 1, name: 'Bend the hook' })).toBeVisible()
    await pedal(page, 'PageDown')
    await expect(page.getByRole('heading', { level: 1, name: /Hook, across/ })).toBeVisible()
    await page.keyboard.type('11.6')
    await expect(page.getByRole('button', { name: /It is 11.6/ }).first()).toBeVisible()
    await pedal(page, 'Enter')
    await pedal(page, 'PageDown')
    await expect(page.getByRole('heading', { level: 1, name: 'Look at it' })).toBeVisible()
    await pedal(page, 'PageDown')
    await expect(page.getByRole('button', { name: 'Take it, after 3' })).toBeVisible()
    await pedal(page, 'Enter')
    await expect(page.getByRole('button', { name: 'Use this photo' })).toBeVisible({ timeout: 15_000 })
    await light(page, 'Use this photo')
    await pedal(page, 'Enter')
    await expect(page.getByRole('button', { name: 'Use this photo' })).toBeHidden()
    await pedal(page, 'PageDown')
    await expect(page.getByRole('heading', { name: 'Put the bench to rights' })).toBeVisible()
    for (const item of ['Offcuts in the scrap tray', 'Tools back', 'Finished']) {
      await tabTo(page, page.getByRole('button', { name: item, exact: true }))
      await pedal(page, 'Enter')
    }
    await expect(page.getByRole('heading', { name: 'Finished' })).toBeVisible()
    await expect(page.getByText('Kept here and sent')).toBeVisible({ timeout: 20_000 })
    await expect(page.getByText(/^AMY\d?-EW-1$/)).toBeVisible()
    return await page.getByText(/^AMY\d?-EW-1$/).innerText()
  })

  const piece = await test.step('the instructor judges the piece', async () => {
    const { page } = ruth
    await page.goto('/looks')
    await awake(page)
    await pressOn(page, page.getByRole('link', { name: new RegExp(label) }).first())
    await page.waitForURL('**/looks/*')
    await awake(page)
    await expect(page.getByText(/1 hold missed/)).toBeVisible()
    // One key a line: the first press finds the first line, 3 is yes.
    await page.keyboard.press('3')
    await expect(page.locator('[data-line="marks"]').locator(':focus')).toBeVisible()
    await page.keyboard.press('3')
    await page.keyboard.press('3')
    await expect(page.locator('[data-line="size"] input')).toBeFocused()
    await page.keyboard.type('11.6')
    await page.keyboard.press('Enter')
    await page.keyboard.press('s')
    await page.locator('[data-choice]').first().waitFor()
    await page.keyboard.press('1')
    await page.keyboard.press('p')
    await page.locator('[data-choice]').first().waitFor()
    await page.keyboard.press('1')
    await page.keyboard.press('l')
    await page.locator('[data-choice]').first().waitFor()
    await expect(page.getByText(/It takes 2 pieces running/)).toBeVisible()
    await page.keyboard.press('2')
    await pressOn(page, page.getByRole('button', { name: /^To sign/ }))
    await page.waitForURL(url => !/looks\/[0-9A-Z]{26}/.test(url.pathname) || url.search !== '')
    return page.url()
  })
  expect(piece).toContain('/looks')

  await test.step('signs it once for the sitting, with the password; a double press is one', async () => {
    const { page } = ruth
    await page.goto('/looks/to-sign')
    await awake(page)
    await expect(page.getByText(label).first()).toBeVisible()
    await typeInto(page, page.getByLabel(/password/i).first(), 'not this one')
    await page.keyboard.press('Enter')
    await expect(page.getByText(/not your password/i).first()).toBeVisible()
    await expect(page.getByText(label).first()).toBeVisible()
    await typeInto(page, page.getByLabel(/password/i).first(), 'third hand bench')
    await page.keyboard.press('Enter')
    await page.keyboard.press('Enter')
    await expect(page.getByText(/Signed: With me beside you, 2/).first()).toBeVisible()
  })

  await test.step('the table shows the bead with its level, and the letter is in the catcher', async () => {
    const { page } = ruth
    await page.goto('/classes')
    await awake(page)
    await pressOn(page, page.getByRole('link', { name: /Tuesday evening/ }).first())
    await expect(page.getByRole('heading', { level: 1, name: 'Tuesday evening' })).toBeVisible()
    await expect(page.getByRole('button', { name: new RegExp(`Amy Brandt, ${title}: With me beside you, 2`) })).toBeVisible()
    await expect.poll(async () => JSON.stringify((await (await fetch(`${process.env.TEST_CATCHER_URL}/mails`)).json())), { timeout: 20_000 }).toContain(`${title}: signed at 2`)
  })

  await test.step('a stranger of another studio learns of none of it', async () => {
    const stranger = await person(browser)
    const made = await ask(owen, 'GET', '/api/me')
    expect(made.status).toBe(200)
    const addresses = [...new Set([...ruth.visited, ...amy.visited])].filter(path => /[0-9A-Z]{26}/.test(path) || path.includes(slug))
    expect(addresses.length).toBeGreaterThan(5)
    await comeIn(stranger, await strangerEmail())
    for (const path of addresses) {
      const { status } = await ask(stranger, 'GET', path)
      expect([404, 405], path).toContain(status)
    }
    await stranger.context.close()
  })

  for (const who of [ruth, owen, amy]) expect(who.troubles).toEqual([])
})

/** A manager and instructor of a studio of their own, put straight into the database. */
async function strangerEmail(): Promise<string> {
  const { makeStranger } = await import('./stranger')
  return await makeStranger()
}
