import { boolean, date, foreignKey, index, int, json, mysqlEnum, mysqlTable, primaryKey, tinyint, uniqueIndex, varchar } from 'drizzle-orm/mysql-core'
import { PERMISSIONS } from '../../../shared/lesson/schema'
import { JUDGED_AS, OUTCOMES, PERMISSION_ACTS, SAYS, SEEN, SIGN_OFF_KINDS } from '../../../shared/schemas/lists'
import { code, longtext, moment, sha, ulid } from './columns'
import { lessons, revisions } from './lessons'
import { pieces } from './pieces'
import { memberships } from './studio'

/** One look at one piece. The id is made on the page: a double press is the same row. */
export const judgements = mysqlTable('judgements', {
  studioId: ulid('studio_id').notNull(),
  id: ulid('id').notNull(),
  pieceId: ulid('piece_id').notNull(),
  by: ulid('by').notNull(),
  as: mysqlEnum('as', JUDGED_AS).notNull(),
  seen: mysqlEnum('seen', SEEN).notNull(),
  /** What was shown to the judge. */
  n: int('n').notNull(),
  head: sha('head').notNull(),
  outcome: mysqlEnum('outcome', OUTCOMES).notNull(),
  /** The level the judge would give on this piece; signed later, gathered with others. Null: none. */
  level: tinyint('level'),
  scales: json('scales').$type<Record<string, number> | null>(),
  /** Keys of the lesson's faults the judge pointed to. */
  faults: json('faults').$type<string[] | null>(),
  /** A photo was still on its tablet, and the judge had the piece in the hand instead. */
  inHand: boolean('in_hand').notNull().default(false),
  wordsId: ulid('words_id'),
  signerLevel: tinyint('signer_level').notNull(),
  at: moment('at').notNull(),
}, t => [
  primaryKey({ name: 'pk_judgements', columns: [t.studioId, t.id] }),
  uniqueIndex('u_judgements_once').on(t.studioId, t.pieceId, t.by, t.as, t.n),
  index('i_judgements_by').on(t.studioId, t.by, t.at),
  foreignKey({ name: 'fk_judgements_piece', columns: [t.studioId, t.pieceId], foreignColumns: [pieces.studioId, pieces.id] }),
  foreignKey({ name: 'fk_judgements_by', columns: [t.studioId, t.by], foreignColumns: [memberships.studioId, memberships.personId] }),
])

export const marks = mysqlTable('marks', {
  studioId: ulid('studio_id').notNull(),
  judgementId: ulid('judgement_id').notNull(),
  criterion: code(40)('criterion').notNull(),
  /** What the judge said, for a judged line. */
  says: mysqlEnum('says', SAYS),
  /** What was measured again by the judge, in the reading's base unit; decimal text. */
  value: varchar('value', { length: 24 }),
  unit: varchar('unit', { length: 8 }),
  /** For a measured line: inside its tolerance at the level given, worked out when judged. */
  within: boolean('within'),
  essential: boolean('essential').notNull(),
  /** Said by one press of "the rest are yes", never for an essential line. */
  rest: boolean('rest').notNull().default(false),
  photoId: ulid('photo_id'),
}, t => [
  primaryKey({ name: 'pk_marks', columns: [t.studioId, t.judgementId, t.criterion] }),
  foreignKey({ name: 'fk_marks_judgement', columns: [t.studioId, t.judgementId], foreignColumns: [judgements.studioId, judgements.id] }),
])

/** Gives a level. Nothing is ever changed: a correction or a second name stands beside (`of`). */
export const signOffs = mysqlTable('sign_offs', {
  studioId: ulid('studio_id').notNull(),
  id: ulid('id').notNull(),
  personId: ulid('person_id').notNull(),
  personNameVersion: int('person_name_version').notNull(),
  lessonId: ulid('lesson_id').notNull(),
  revisionId: ulid('revision_id').notNull(),
  level: tinyint('level').notNull(),
  kind: mysqlEnum('kind', SIGN_OFF_KINDS).notNull(),
  /** The sign-off this one stands beside; its own id for a first one, so that "one of a kind by one hand" can be unique. */
  of: ulid('of').notNull(),
  by: ulid('by').notNull(),
  byNameVersion: int('by_name_version').notNull(),
  byLevel: tinyint('by_level').notNull(),
  at: moment('at').notNull(),
  onDay: date('on_day', { mode: 'string' }).notNull(),
  /** SHA-256 of canonical {piece, revision source_sha, n, head, photo shas, marks} of each piece. */
  digest: sha('digest').notNull(),
  wordsId: ulid('words_id'),
}, t => [
  primaryKey({ name: 'pk_sign_offs', columns: [t.studioId, t.id] }),
  uniqueIndex('u_sign_offs_once').on(t.studioId, t.of, t.kind, t.by),
  index('i_sign_offs_person').on(t.studioId, t.personId, t.lessonId),
  foreignKey({ name: 'fk_sign_offs_person', columns: [t.studioId, t.personId], foreignColumns: [memberships.studioId, memberships.personId] }),
  foreignKey({ name: 'fk_sign_offs_lesson', columns: [t.studioId, t.lessonId], foreignColumns: [lessons.studioId, lessons.id] }),
  foreignKey({ name: 'fk_sign_offs_revision', columns: [t.studioId, t.revisionId], foreignColumns: [revisions.studioId, revisions.id] }),
  foreignKey({ name: 'fk_sign_offs_by', columns: [t.studioId, t.by], foreignColumns: [memberships.studioId, memberships.personId] }),
])

export const signOffPieces = mysqlTable('sign_off_pieces', {
  studioId: ulid('studio_id').notNull(),
  signOffId: ulid('sign_off_id').notNull(),
  judgementId: ulid('judgement_id').notNull(),
}, t => [
  primaryKey({ name: 'pk_sign_off_pieces', columns: [t.studioId, t.signOffId, t.judgementId] }),
  foreignKey({ name: 'fk_sign_off_pieces_sign', columns: [t.studioId, t.signOffId], foreignColumns: [signOffs.studioId, signOffs.id] }),
  foreignKey({ name: 'fk_sign_off_pieces_judged', columns: [t.studioId, t.judgementId], foreignColumns: [judgements.studioId, judgements.id] }),
])

export const permissionActs = mysqlTable('permission_acts', {
  studioId: ulid('studio_id').notNull(),
  id: ulid('id').notNull(),
  personId: ulid('person_id').notNull(),
  permission: mysqlEnum('permission', PERMISSIONS).notNull(),
  /** Goods are permitted lesson by lesson. */
  lessonId: ulid('lesson_id'),
  act: mysqlEnum('act', PERMISSION_ACTS).notNull(),
  limit: varchar('limit', { length: 60 }),
  by: ulid('by').notNull(),
  at: moment('at').notNull(),
  wordsId: ulid('words_id'),
  of: ulid('of'),
}, t => [
  primaryKey({ name: 'pk_permission_acts', columns: [t.studioId, t.id] }),
  index('i_permission_acts_person').on(t.studioId, t.personId, t.permission),
  foreignKey({ name: 'fk_permission_acts_person', columns: [t.studioId, t.personId], foreignColumns: [memberships.studioId, memberships.personId] }),
])

/** Facts only, one row a person and lesson, written by refreshStanding and nothing else. Lapse is never stored. */
export const standings = mysqlTable('standings', {
  studioId: ulid('studio_id').notNull(),
  personId: ulid('person_id').notNull(),
  lessonId: ulid('lesson_id').notNull(),
  levelSigned: tinyint('level_signed').notNull(),
  /** The level awaits its second name. */
  oneSignature: boolean('one_signature').notNull(),
  signedOn: date('signed_on', { mode: 'string' }),
  signOffId: ulid('sign_off_id'),
  lastPieceOn: date('last_piece_on', { mode: 'string' }),
  /** The last day in an unbroken run of work since the sign-off; what lapsed before it is not brought back by a later piece. */
  aliveOn: date('alive_on', { mode: 'string' }),
  /** Days the level lives without practice, as the revision it was signed under says. */
  keeps: int('keeps'),
  pieces: int('pieces').notNull(),
  openPiece: ulid('open_piece'),
  placeNo: int('place_no'),
  places: int('places'),
  waitingSince: moment('waiting_since'),
  sentBackOn: date('sent_back_on', { mode: 'string' }),
  revisionRead: ulid('revision_read'),
  flags: json('flags').$type<string[]>().notNull(),
}, t => [
  primaryKey({ name: 'pk_standings', columns: [t.studioId, t.personId, t.lessonId] }),
  foreignKey({ name: 'fk_standings_person', columns: [t.studioId, t.personId], foreignColumns: [memberships.studioId, memberships.personId] }),
  foreignKey({ name: 'fk_standings_lesson', columns: [t.studioId, t.lessonId], foreignColumns: [lessons.studioId, lessons.id] }),
])

/** Locked FOR UPDATE, last thing before commit. */
export const registerHeads = mysqlTable('register_heads', {
  studioId: ulid('studio_id').primaryKey(),
  seq: int('seq').notNull(),
  hash: sha('hash').notNull(),
})

/** Written by register.append only. */
export const register = mysqlTable('register', {
  studioId: ulid('studio_id').notNull(),
  seq: int('seq').notNull(),
  at: moment('at').notNull(),
  actor: ulid('actor').notNull(),
  actorRole: varchar('actor_role', { length: 40 }).notNull(),
  act: code(40)('act').notNull(),
  objectKind: code(30)('object_kind').notNull(),
  objectId: ulid('object_id').notNull(),
  /** Canonical JSON: ids, codes, numbers, hashes; no name, no free text. */
  body: longtext('body').notNull(),
  prev: sha('prev').notNull(),
  hash: sha('hash').notNull(),
}, t => [primaryKey({ name: 'pk_register', columns: [t.studioId, t.seq] })])
