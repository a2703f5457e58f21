import { chromium } from '@playwright/test'
const [who, ...pages] = process.argv.slice(2)
const base = process.env.BASE ?? 'http://localhost:4100'
const b = await chromium.launch({ executablePath: '/usr/bin/chromium', args: ['--no-sandbox','--disable-gpu','--disable-quic','--no-first-run','--disable-background-networking','--use-fake-ui-for-media-stream','--use-fake-device-for-media-stream'] })
const size = (process.env.SIZE ?? '1360x900').split('x').map(Number)
const c = await b.newContext({ viewport: { width: size[0], height: size[1] }, locale: 'en-GB' })
if (who !== '-') { const r = await c.request.post(base + '/api/come-in', { data: { email: who + '@tallow-yard.example', password: 'third hand bench' }, headers: { origin: base } }); if (!r.ok()) console.log('come-in', r.status(), await r.text()) }
const p = await c.newPage()
p.on('console', m => { if (m.type() === 'error' || m.type() === 'warning') console.log('CONSOLE', m.text().slice(0, 300)) })
p.on('pageerror', e => console.log('PAGEERROR', e.message.slice(0, 300)))
for (const spec of pages) {
  const [path, name] = spec.split('=')
  const r = await p.goto(base + path, { waitUntil: 'networkidle' })
  console.log(path, r?.status(), p.url())
  await p.screenshot({ path: `/tmp/th/shots/${name}.png` })
}
await b.close()
