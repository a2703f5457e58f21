import type { Me } from '#shared/types/entry'

/** A courtesy, and no protection: who has not come in is asked who they are, and then goes on to where they were going. The bench asks by itself, as it also works out of reach. */
const OPEN = /^\/(?:come-in|mail|bench)(?:\/|$)/

export default defineNuxtRouteMiddleware(async (to) => {
  // What is no page at all says so to everyone.
  if (to.matched.length === 0 || OPEN.test(to.path) || useNuxtData<Me>('me').data.value) return
  const status = await useRequestFetch()('/api/me').then(() => 200, (error: unknown) => error instanceof Error && 'statusCode' in error ? error.statusCode : 0)
  if (status === 401) return navigateTo({ path: '/come-in', query: to.path === '/' ? {} : { next: to.fullPath } }, { replace: true })
})
