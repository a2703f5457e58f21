/** Browsers of people, worked by keyboard alone. */
import { ulid } from 'ulid'
import { z } from 'zod'
import { type Browser, type BrowserContext, expect, type Locator, type Page } from '@playwright/test'

export const PASSWORD = 'third hand bench'

/** A browser of its own; whatever goes wrong in it (console, request to another host, content policy) is gathered. */
export interface Person { context: BrowserContext, page: Page, troubles: string[], visited: string[] }

export async function person(browser: Browser, size = { width: 1360, height: 900 }): Promise<Person> {
  const context = await browser.newContext({ viewport: size, permissions: ['camera'] })
  const page = await context.newPage()
  const troubles: string[] = []
  const visited: string[] = []
  page.on('console', (message) => {
    // A refusal that the page shows in words is told to the console by the browser itself.
    if (['error', 'warning'].includes(message.type()) && !/Failed to load resource: the server responded with a status of (401|404|409|422)/.test(message.text())) troubles.push(message.text())
  })
  page.on('pageerror', error => troubles.push(error.message))
  page.on('request', (request) => {
    const url = new URL(request.url())
    if (url.hostname !== 'localhost' && !['blob:', 'data:'].includes(url.protocol)) troubles.push(`asked ${url.host}`)
    if (url.pathname.startsWith('/api/')) visited.push(url.pathname)
  })
  return { context, page, troubles, visited }
}

/** Presses Tab until this has the focus, as a person without a mouse would. */
export async function tabTo(page: Page, target: Locator): Promise<void> {
  await expect(target).toBeVisible()
  const isThere = () => target.evaluate(element => element === document.activeElement)
  for (let i = 0; i < 160; i++) {
    if (await isThere()) return
    await page.keyboard.press('Tab')
  }
  throw new Error(`Tab never reached ${String(target)}`)
}

export async function pressOn(page: Page, target: Locator, key = 'Enter'): Promise<void> {
  await tabTo(page, target)
  await page.keyboard.press(key)
}

export async function typeInto(page: Page, target: Locator, text: string): Promise<void> {
  await tabTo(page, target)
  await page.keyboard.press('ControlOrMeta+A')
  await page.keyboard.insertText(text)
}

/** A short press of a key, as a pedal sends it; the next one waits out the bounce. */
export async function pedal(page: Page, key: string, times = 1): Promise<void> {
  for (let i = 0; i < times; i++) {
    await page.keyboard.press(key)
    await page.waitForFunction(since => performance.now() - since > 340, await page.evaluate(() => performance.now()))
  }
}

/** Waits until the page answers to keys: the application has taken the server's page over. */
export async function awake(page: Page): Promise<void> {
  await page.waitForFunction(() => {
    const root: { __vue_app__?: unknown } | null = document.querySelector('#__nuxt')
    return root?.__vue_app__ !== undefined
  })
}

export async function comeIn({ page }: Person, key: string, password = PASSWORD): Promise<void> {
  await page.goto('/come-in')
  await awake(page)
  await typeInto(page, page.getByLabel('E-mail'), key.includes('@') ? key : `${key}@tallow-yard.example`)
  await typeInto(page, page.getByLabel('Password'), password)
  await page.keyboard.press('Enter')
  await page.waitForURL(url => url.pathname !== '/come-in')
}

/** Asks the application's own routes as this person, for what is not the matter of a test. */
export async function ask({ context }: Person, method: 'GET' | 'POST' | 'PUT', path: string, body?: unknown): Promise<{ status: number, body: unknown }> {
  const base = String(process.env.TEST_BASE_URL)
  const answer = await context.request.fetch(`${base}${path}`, { method, data: body, headers: { 'origin': base, 'sec-fetch-site': 'same-origin' } })
  const type = answer.headers()['content-type'] ?? ''
  return { status: answer.status(), body: type.startsWith('application/json') ? await answer.json() : null }
}

const one = z.object({ id: z.string() })
/** Puts a lesson of this text into use and into the class of Tuesday evening, through the routes: it is not the matter of a test. */
export async function lessonInClass(author: Person, manager: Person, title: string, source: string): Promise<{ id: string, slug: string }> {
  const lesson = one.extend({ slug: z.string() }).parse((await ask(author, 'POST', '/api/lessons', { id: ulid(), title, craft: 'wire' })).body)
  const draft = z.object({ etag: z.string() }).parse((await ask(author, 'GET', `/api/lessons/${lesson.id}/draft`)).body)
  const { etag } = z.object({ etag: z.string() }).parse((await ask(author, 'PUT', `/api/lessons/${lesson.id}/draft`, { etag: draft.etag, source })).body)
  expect((await ask(author, 'POST', `/api/lessons/${lesson.id}/use`, { id: ulid(), etag, effect: 'first', note: 'First revision' })).status).toBe(201)
  const classes = z.array(one.extend({ name: z.string() })).parse((await ask(manager, 'GET', '/api/classes')).body)
  const evening = classes.find(each => each.name === 'Tuesday evening')
  expect((await ask(manager, 'POST', `/api/classes/${evening?.id}/lessons`, { id: ulid(), lessonId: lesson.id })).status).toBeLessThan(300)
  return lesson
}
