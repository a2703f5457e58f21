import type { Role } from '../../shared/schemas/lists'

/** Who acts, in which studio, with which roles there; read from the database at each request. */
export interface Actor {
  studioId: string
  personId: string
  roles: readonly Role[]
}
