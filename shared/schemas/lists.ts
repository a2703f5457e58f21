/** Closed lists used by the database, the schemas and the screens alike. */
export const ROLES = ['apprentice', 'instructor', 'manager', 'assessor'] as const
export type Role = (typeof ROLES)[number]
export const ROLE_ACTS = ['given', 'ended'] as const
export const HANDS = ['right', 'left'] as const
export type Hand = (typeof HANDS)[number]
export const GROUNDS = ['paper', 'grey', 'peach', 'dark'] as const
export type Ground = (typeof GROUNDS)[number]
export const AGE_BANDS = ['adult', '16-17', 'under-16'] as const
export type AgeBand = (typeof AGE_BANDS)[number]
export const TOKEN_KINDS = ['invite', 'reset', 'email', 'card'] as const
export const MAIL_KINDS = ['invitation', 'reset', 'email-change', 'look-given', 'judged', 'signed', 'second-name', 'hold-released'] as const
export type MailKind = (typeof MAIL_KINDS)[number]
export const MAIL_STATES = ['waits', 'sending', 'sent', 'given-up'] as const
export const RELATION_KINDS = ['relative', 'partner', 'employer'] as const
export type RelationKind = (typeof RELATION_KINDS)[number]
/** What a new revision changes: its first use, words only, a step, or the standard or safety. */
export const EFFECTS = ['first', 'words', 'step', 'standard'] as const
export type Effect = (typeof EFFECTS)[number]
export const REVISION_ACTS = ['into-use', 'withdrawn', 'withdrawn-danger', 'back-in-use'] as const
export const PIECE_STATUSES = ['at-bench', 'finished', 'judged', 'put-away'] as const
export type PieceStatus = (typeof PIECE_STATUSES)[number]
export const PHOTO_STATES = ['awaited', 'held', 'erased'] as const
export const PHOTO_FOR = ['hold', 'step', 'finished', 'fault', 'resume'] as const
export const OUTCOMES = ['kept', 'sent-back', 'mend'] as const
export type Outcome = (typeof OUTCOMES)[number]
export const JUDGED_AS = ['instructor', 'own', 'second-look', 'shared', 'refresh'] as const
/** How much of the making the judge saw: start to finish, at hold points, the piece in the hand, a photo. */
export const SEEN = ['whole', 'holds', 'piece', 'photo'] as const
export type Seen = (typeof SEEN)[number]
export const SAYS = ['yes', 'nearly', 'no'] as const
export type Says = (typeof SAYS)[number]
/** founding: a level 5 given by the manager where nobody holds one yet; shown as such for ever. */
export const SIGN_OFF_KINDS = ['sign', 'countersign', 'correction', 'refresh', 'founding'] as const
export type SignOffKind = (typeof SIGN_OFF_KINDS)[number]
export const PERMISSION_ACTS = ['grant', 'suspend', 'lift', 'limit', 'withdraw', 'regain'] as const
export type PermissionAct = (typeof PERMISSION_ACTS)[number]
