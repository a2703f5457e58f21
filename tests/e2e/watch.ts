/** Every page of a test is watched: an error on the console, a policy report or a request to another host fails it. */
import { test as base, type Page } from '@playwright/test'

export { expect } from '@playwright/test'

/** A refusal is an answer, and Chromium prints each one; what the page makes of it is for the test to say. */
const ANSWER = /^Failed to load resource: the server responded with a status of (?:400|401|403|404|409|422|429) /

function watch(page: Page, host: string, wrong: string[]): void {
  page.on('console', (message) => { if (message.type() === 'error' && !ANSWER.test(message.text())) wrong.push(`console: ${message.text()}`) })
  page.on('console', (message) => { if (/hydration/i.test(message.text())) wrong.push(`hydration: ${message.text()}`) })
  page.on('pageerror', error => wrong.push(`page: ${error.message}`))
  page.on('request', (request) => {
    const url = new URL(request.url())
    if (/^(?:https?|wss?):$/.test(url.protocol) && url.host !== host) wrong.push(`request: ${request.url()}`)
  })
}

export const test = base.extend<{ watched: string[] }>({
  watched: [async ({ context, baseURL }, use) => {
    const wrong: string[] = []
    const host = new URL(baseURL ?? '').host
    context.on('page', page => watch(page, host, wrong))
    await use(wrong)
    base.expect(wrong).toEqual([])
  }, { auto: true }],
})
