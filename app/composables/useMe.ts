import type { Act } from '#shared/judging/roles'
import type { Me } from '#shared/types/entry'

/** Who is here, in which studio, and what they may; null when nobody is. One answer for the whole page. */
export async function useMe() {
  const { data, refresh } = await useFetch<Me>('/api/me', { key: 'me' })
  const may = (act: Act): boolean => data.value?.may.includes(act) ?? false
  return { me: data, may, refresh }
}
