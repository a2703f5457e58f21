import { createTransport, type Transporter } from 'nodemailer'
import { sendWaiting } from '#server/services/mail'

let transport: Transporter | null = null
let sending: Promise<unknown> | null = null
let again = false

/** Sends what waits in the queue, now and beside the request. One at a time; a kick while sending sends once more. */
export function kickMail(): void {
  const { smtpUrl, mailFrom, publicUrl } = useRuntimeConfig()
  if (!smtpUrl) return
  if (sending) { again = true; return }
  transport ??= createTransport(smtpUrl)
  const by = transport
  sending = sendWaiting(useDatabase(), { send: letter => by.sendMail({ from: mailFrom, ...letter }), publicUrl }, new Date())
    .catch((error: unknown) => console.error('Mail waits:', error instanceof Error ? error.message : error))
    .finally(() => {
      sending = null
      if (again) { again = false; kickMail() }
    })
}
