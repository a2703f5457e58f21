import { kickMail } from '../utils/mail'
import { closeDatabase } from '../utils/database'

const MAIL_EVERY_MS = 30_000

/** Refuses to run on a missing secret, sends mail that still waits, and lets go of the database at the end. */
export default defineNitroPlugin((nitro) => {
  const { session, databaseUrl } = useRuntimeConfig()
  if (session.password.length < 32) throw new Error('NUXT_SESSION_PASSWORD is missing or shorter than 32 letters.')
  if (!databaseUrl) throw new Error('NUXT_DATABASE_URL is missing.')
  const timer = setInterval(kickMail, MAIL_EVERY_MS)
  kickMail()
  nitro.hooks.hook('close', async () => {
    clearInterval(timer)
    await closeDatabase()
  })
})
