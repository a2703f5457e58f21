/**
 * Stands in for a mail server on loopback: takes every letter over SMTP, keeps it as a file, and tells of them over HTTP.
 * GET /mails (newest first), GET /mails/:id, DELETE /mails. Prints the two ports as one line of JSON when it listens.
 */
import { mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { createServer, type IncomingMessage, type ServerResponse } from 'node:http'
import type { AddressInfo } from 'node:net'
import { join } from 'node:path'
import PostalMime from 'postal-mime'
import { SMTPServer } from 'smtp-server'
import { ulid } from 'ulid'

const folder = process.env.CATCHER_FOLDER
if (!folder) throw new Error('CATCHER_FOLDER is missing: where caught mail is kept.')
mkdirSync(folder, { recursive: true, mode: 0o700 })

const smtp = new SMTPServer({
  authOptional: true, disabledCommands: ['AUTH', 'STARTTLS'], disableReverseLookup: true, size: 2_000_000,
  onData(stream, session, done) {
    const chunks: Buffer[] = []
    stream.on('data', (chunk: Buffer) => chunks.push(chunk))
    stream.on('end', () => { keep(Buffer.concat(chunks), session.envelope.rcptTo.map(to => to.address)).then(() => done(), done) })
  },
})

async function keep(raw: Buffer, to: string[]): Promise<void> {
  const mail = await PostalMime.parse(raw)
  const id = ulid()
  writeFileSync(join(folder ?? '', `${id}.json`), JSON.stringify({ id, at: new Date().toISOString(), to, subject: mail.subject ?? '', text: mail.text ?? '', html: mail.html ?? '' }), { mode: 0o600 })
}

const ids = () => readdirSync(folder).filter(name => /^[0-9A-Z]{26}\.json$/.test(name)).sort().reverse().map(name => name.slice(0, 26))
const read = (id: string): unknown => JSON.parse(readFileSync(join(folder, `${id}.json`), 'utf8'))

function answer(request: IncomingMessage, response: ServerResponse): void {
  const reply = (status: number, body: unknown) => response.writeHead(status, { 'content-type': 'application/json', 'cache-control': 'no-store' }).end(JSON.stringify(body))
  const id = /^\/mails\/([0-9A-Z]{26})$/.exec(request.url ?? '')?.[1]
  if (request.method === 'GET' && request.url === '/mails') return void reply(200, ids().map(read))
  if (request.method === 'GET' && id && ids().includes(id)) return void reply(200, read(id))
  if (request.method === 'DELETE' && request.url === '/mails') {
    for (const one of ids()) rmSync(join(folder ?? '', `${one}.json`))
    return void reply(200, {})
  }
  reply(404, {})
}

const http = createServer(answer)
const portOf = (address: string | AddressInfo | null): number => typeof address === 'object' && address ? address.port : 0
smtp.listen(0, '127.0.0.1', () => http.listen(0, '127.0.0.1', () => {
  process.stdout.write(`${JSON.stringify({ smtp: portOf(smtp.server.address()), http: portOf(http.address()) })}\n`)
}))
for (const signal of ['SIGINT', 'SIGTERM'] as const) process.on(signal, () => { smtp.close(); http.close(); process.exit(0) })
