/** Browsers of people, worked by keyboard alone. */
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
export async function ask({ context }: Person, method: 'GET' | 'POST', path: string, body?: unknown): Promise<{ status: number, body: unknown }> {
  const base = String(process.env.TEST_BASE_URL)
  const answer = await context.request.fetch(`${base}${path}`, { method, data: body, headers: { 'origin': base, 'sec-fetch-site': 'same-origin' } })
  const type = answer.headers()['content-type'] ?? ''
  return { status: answer.status(), body: type.startsWith('application/json') ? await answer.json() : null }
}
