/**
 * How many pieces wait for a look, shared by all who show it. `refresh` counts again at once: refreshNuxtData would wait for the
 * browser to be idle, which on a busy machine is long after the page was left.
 */
export function useLooksCount(isShown: boolean) {
  return useFetch<{ waiting: number }>('/api/looks/count', { key: 'looks:count', immediate: isShown })
}
