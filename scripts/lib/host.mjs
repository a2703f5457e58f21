import { trouble } from './say.mjs'

const LOOPBACK = new Set(['localhost', '127.0.0.1', '::1'])

/** Where it is served and how it is called. Off loopback only with TLS: without it a browser gives no camera and keeps no secure cookie. */
export function placeOf(env) {
  const host = env.HOST || 'localhost'
  const port = Number(env.PORT || 3000)
  if (!Number.isInteger(port) || port < 1 || port > 65535) trouble(`PORT ${env.PORT} is no port. Take a number from 1 to 65535.`)
  const isLocal = LOOPBACK.has(host)
  const tls = Boolean(env.NITRO_SSL_CERT && env.NITRO_SSL_KEY)
  const behindTls = env.PUBLIC_URL?.startsWith('https://') ?? false
  if (!isLocal && !tls && !behindTls) {
    trouble(`HOST ${host} can be reached from other machines, and plain http is not safe there: passwords could be read on the way, and a tablet gives no camera. Set NITRO_SSL_CERT and NITRO_SSL_KEY, or PUBLIC_URL=https://... behind a proxy that has the certificate.`)
  }
  return { host, port, isLocal, listen: host === 'localhost' ? '127.0.0.1' : host, url: env.PUBLIC_URL ?? `${tls ? 'https' : 'http'}://${host}:${port}` }
}
