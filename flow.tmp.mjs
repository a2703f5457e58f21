import { chromium } from '@playwright/test'
const base = 'http://localhost:4100'
const b = await chromium.launch({ executablePath: '/usr/bin/chromium', args: ['--no-sandbox','--disable-gpu','--disable-quic','--no-first-run','--disable-background-networking','--use-fake-ui-for-media-stream','--use-fake-device-for-media-stream'] })
const c = await b.newContext({ viewport: { width: 1180, height: 820 }, locale: 'en-GB', permissions: ['camera'] })
await c.request.post(base + '/api/come-in', { data: { email: process.argv[2] + '@tallow-yard.example', password: 'third hand bench' }, headers: { origin: base } })
const p = await c.newPage()
p.on('console', m => { if (['error','warning'].includes(m.type())) console.log('CONSOLE', m.text().slice(0, 400)) })
p.on('pageerror', e => console.log('PAGEERROR', e.message.slice(0, 400)))
let n = 0
const shot = async name => { await p.waitForTimeout(600); await p.screenshot({ path: `/tmp/th/shots/f${String(++n).padStart(2,'0')}-${name}.png` }); console.log(n, name, p.url(), (await p.title())) }
await p.goto(base + '/bench', { waitUntil: 'networkidle' }); await shot('home')
await p.goto(base + '/bench/lessons/wrapped-loop-link', { waitUntil: 'networkidle' }); await shot('sizes')
console.log(await p.locator('body').ariaSnapshot().then(s => s.slice(0, 3000)))
const begin = p.getByRole('button', { name: /Begin the piece/ })
if (await begin.count()) { await begin.click(); await p.waitForTimeout(1500); await shot('begun') }
for (let i = 0; i < Number(process.argv[3] ?? 6); i++) { await p.keyboard.press('PageDown'); await p.waitForTimeout(700); await shot('step' + i) }
console.log(await p.locator('body').ariaSnapshot().then(s => s.slice(0, 3000)))
await b.close()
