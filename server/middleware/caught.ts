import { NOT_HERE } from '#server/services/refuse'

/** The page of caught letters is there only where a catcher runs, and only for this machine. */
export default defineEventHandler((event) => {
  if (!/^\/mail\/?(?:[?#]|$)/i.test(event.path)) return
  if (!useRuntimeConfig(event).catcherUrl || !isLoopback(event)) throw createError({ statusCode: 404, message: NOT_HERE })
})
