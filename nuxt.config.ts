import { fileURLToPath } from 'node:url'

// Where a build goes can be told from outside, so that the tests build beside a running `npm start`.
const buildDir = process.env.THIRDHAND_BUILD_DIR ?? '.nuxt'
const outputDir = process.env.THIRDHAND_OUTPUT_DIR ?? '.output'

export default defineNuxtConfig({
  compatibilityDate: '2026-05-01',
  modules: ['@nuxt/eslint', '@pinia/nuxt', '@nuxtjs/tailwindcss', 'nuxt-auth-utils', '@vueuse/nuxt', 'nuxt-security'],
  devtools: { enabled: false },
  telemetry: false,
  buildDir,
  // `#server` is a name on the server side only; the application cannot reach over.
  nitro: { output: { dir: outputDir }, alias: { '#server': fileURLToPath(new URL('./server', import.meta.url)) } },
  // No islands: the version pinned here lacks later fixes of them (docs/decisions).
  experimental: { componentIslands: false },
  typescript: { strict: true, tsConfig: { compilerOptions: { noUncheckedIndexedAccess: true } } },
  components: [{ path: '~/components', pathPrefix: false }],
  tailwindcss: { cssPath: ['~/assets/css/tailwind.css', { injectPosition: 'first' }], viewer: false },
  css: ['@fontsource/atkinson-hyperlegible/400.css', '@fontsource/atkinson-hyperlegible/700.css'],
  app: {
    head: {
      htmlAttrs: { lang: 'en' },
      title: 'Thirdhand',
      meta: [{ name: 'viewport', content: 'width=device-width, initial-scale=1' }],
      link: [{ rel: 'icon', type: 'image/svg+xml', href: '/icon.svg' }],
    },
  },
  // The pages ask /api/me; what the cookie holds is for the server alone.
  auth: { loadStrategy: 'none' },
  runtimeConfig: {
    databaseUrl: '',
    smtpUrl: '',
    mailFrom: 'Thirdhand <bench@thirdhand.invalid>',
    publicUrl: 'http://localhost:3000',
    filesDir: '.data/files',
    // '1' only where the caught mail may be read: on loopback, with the local catcher.
    catcherUrl: '',
    // How many proxies of our own stand in front; 0 trusts no X-Forwarded-For.
    proxyHops: 0,
    // Set in tests only: requests may carry the time it is to be.
    testClock: '',
    // log2 of the scrypt cost. Empty is what is shipped (services/passwords); tests set less.
    scryptLog2: '',
    session: { name: 'thirdhand', password: '', maxAge: 60 * 60 * 24 * 30, sessionHeader: false, cookie: { sameSite: 'lax', secure: true } },
  },
  routeRules: {
    '/bench/**': { ssr: false },
    // What is typed and not sent lies on the device, so the desk begins there.
    '/lessons/*/write': { ssr: false },
    // A photograph for a lesson comes as it is; the handler counts its bytes.
    '/api/lessons/*/pictures': { security: { requestSizeLimiter: { maxRequestSizeInBytes: 32_100_000 } } },
    // A photo larger than 20 MB gets its own sentence from the handler.
    '/api/photos/*': { security: { requestSizeLimiter: { maxRequestSizeInBytes: 32_100_000 } } },
    '/api/**': { headers: { 'cache-control': 'no-store' } },
  },
  security: {
    headers: {
      contentSecurityPolicy: {
        'default-src': ["'self'"],
        'script-src': ["'self'", "'nonce-{{nonce}}'", "'strict-dynamic'"],
        'script-src-attr': ["'none'"],
        'style-src': ["'self'", "'unsafe-inline'"],
        'img-src': ["'self'", 'data:', 'blob:'],
        'font-src': ["'self'"],
        'connect-src': ["'self'"],
        'media-src': ["'self'", 'blob:'],
        'worker-src': ["'self'"],
        'manifest-src': ["'self'"],
        'object-src': ["'none'"],
        'base-uri': ["'none'"],
        'frame-ancestors': ["'none'"],
        'form-action': ["'self'"],
        'upgrade-insecure-requests': false,
      },
      permissionsPolicy: { camera: ['self'], fullscreen: ['self'], microphone: [], geolocation: [], 'display-capture': [] },
      strictTransportSecurity: { maxAge: 31536000, includeSubdomains: true },
      referrerPolicy: 'same-origin',
      crossOriginEmbedderPolicy: false,
    },
    // A safety note may say `a < b`; what is shown is escaped where it is shown.
    xssValidator: false,
    // A class sits behind one address; the limits on guessing are our own, in the database.
    rateLimiter: false,
    corsHandler: false,
    requestSizeLimiter: { maxRequestSizeInBytes: 4_000_000, maxUploadFileRequestInBytes: 32_000_000, throwError: true },
    removeLoggers: false,
  },
})
