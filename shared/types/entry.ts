/** What travels between the pages of coming in, people and classes and the server. Dates are ISO text. */
import type { Act } from '../judging/roles'
import type { AgeBand, Ground, Hand, MailKind, Role, ROLE_ACTS } from '../schemas/lists'

export interface Me {
  person: { id: string, name: string, hand: Hand, textSize: number, ground: Ground }
  /** Came in by a start card: this evening, this studio. */
  byCard: boolean
  hasEmail: boolean
  studios: { id: string, slug: string, name: string, roles: Role[] }[]
  /** The studio in hand. */
  studio: { id: string, slug: string, name: string, zone: string } | null
  roles: Role[]
  may: Act[]
}

/** What a mailed link is for. `isKnown`: the e-mail has a password here already, and that one is asked. */
export interface LinkAsks { kind: 'invitation' | 'reset' | 'email', name: string, studio: string | null, isKnown: boolean }

export interface PersonRow { id: string, name: string, roles: Role[], ageBand: AgeBand, trailNo: number, joined: string, leftAt: string | null, hasEmail: boolean, cardUntil: string | null }
export interface InvitationRow { id: string, name: string, email: string, roles: Role[], ends: string }
export interface PeopleList { people: PersonRow[], invitations: InvitationRow[] }
export interface PersonView {
  id: string, name: string, roles: Role[], ageBand: AgeBand, trailNo: number, joined: string, leftAt: string | null
  acts: { role: Role, act: (typeof ROLE_ACTS)[number], by: string, at: string }[]
  classes: { id: string, name: string, fromOn: string, untilOn: string | null }[]
}
/** Codes are in this answer and on the paper, and nowhere else. */
export interface CardSheet { className: string, on: string, ends: string, cards: { personId: string, name: string, code: string }[] }
/** A letter that could not be sent. */
export interface LetterRow { id: string, kind: MailKind, to: string, tries: number }
