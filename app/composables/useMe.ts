import type { Act } from '#shared/judging/roles'
import type { Ground, Hand, Role } from '#shared/schemas/lists'

export interface StudioOfMine { id: string, slug: string, name: string, zone: string, roles: Role[] }
export interface Me {
  person: { id: string, name: string, hand: Hand, textSize: number, ground: Ground }
  studios: StudioOfMine[]
  studio: Omit<StudioOfMine, 'roles'> | null
  roles: Role[]
  may: Act[]
}

/** Who is here, in which studio, and what they may; null when nobody is. One answer for the whole page. */
export async function useMe() {
  const { data, refresh } = await useFetch<Me>('/api/me', { key: 'me' })
  const may = (act: Act): boolean => data.value?.may.includes(act) ?? false
  return { me: data, may, refresh }
}
