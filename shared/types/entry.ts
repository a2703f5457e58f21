/** What travels between the pages of coming in, people and classes and the server. Dates are ISO text. */
import type { Act } from '../judging/roles'
import type { Ground, Hand, Role } from '../schemas/lists'

export interface Me {
  person: { id: string, name: string, hand: Hand, textSize: number, ground: Ground }
  studios: { id: string, slug: string, name: string, roles: Role[] }[]
  /** The studio in hand. */
  studio: { id: string, slug: string, name: string, zone: string } | null
  roles: Role[]
  may: Act[]
}
