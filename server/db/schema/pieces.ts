import { boolean, date, decimal, foreignKey, index, int, json, mysqlEnum, mysqlTable, primaryKey, uniqueIndex, varchar } from 'drizzle-orm/mysql-core'
import { PHOTO_FOR, PHOTO_STATES, PIECE_STATUSES } from '../../../shared/schemas/lists'
import { code, longtext, moment, sha, ulid } from './columns'
import { lessons, revisions } from './lessons'
import { memberships } from './studio'

/** One attempt by one person; everything here is a projection of its events. */
export const pieces = mysqlTable('pieces', {
  studioId: ulid('studio_id').notNull(),
  /** Made on the tablet. */
  id: ulid('id').notNull(),
  personId: ulid('person_id').notNull(),
  lessonId: ulid('lesson_id').notNull(),
  revisionId: ulid('revision_id').notNull(),
  /** What is written on the bag: AMY-WL-3. */
  label: varchar('label', { length: 20 }).notNull(),
  status: mysqlEnum('status', PIECE_STATUSES).notNull(),
  round: ulid('round').notNull(),
  /** Address of the turn in hand; null when all is done. */
  place: code(100)('place'),
  turnsDone: int('turns_done').notNull(),
  turnsAll: int('turns_all').notNull(),
  /** Number of events stored, and the rolled hash of them. */
  n: int('n').notNull(),
  head: sha('head').notNull(),
  /** A kept fold; may be thrown away and made again. */
  state: json('state').$type<unknown>().notNull(),
  machine: int('machine').notNull(),
  practice: boolean('practice').notNull(),
  material: varchar('material', { length: 60 }).notNull(),
  goodsId: ulid('goods_id'),
  startedAt: moment('started_at').notNull(),
  finishedAt: moment('finished_at'),
  finishedOn: date('finished_on', { mode: 'string' }),
  waitingSince: moment('waiting_since'),
}, t => [
  primaryKey({ name: 'pk_pieces', columns: [t.studioId, t.id] }),
  index('i_pieces_waiting').on(t.studioId, t.status, t.waitingSince),
  index('i_pieces_person').on(t.studioId, t.personId, t.lessonId),
  uniqueIndex('u_pieces_label').on(t.studioId, t.label),
  foreignKey({ name: 'fk_pieces_person', columns: [t.studioId, t.personId], foreignColumns: [memberships.studioId, memberships.personId] }),
  foreignKey({ name: 'fk_pieces_lesson', columns: [t.studioId, t.lessonId], foreignColumns: [lessons.studioId, lessons.id] }),
  foreignKey({ name: 'fk_pieces_revision', columns: [t.studioId, t.revisionId], foreignColumns: [revisions.studioId, revisions.id] }),
])

export const pieceEvents = mysqlTable('piece_events', {
  studioId: ulid('studio_id').notNull(),
  pieceId: ulid('piece_id').notNull(),
  n: int('n').notNull(),
  id: ulid('id').notNull(),
  tablet: ulid('tablet').notNull(),
  seq: int('seq').notNull(),
  round: ulid('round').notNull(),
  actor: ulid('actor').notNull(),
  kind: code(30)('kind').notNull(),
  v: int('v').notNull(),
  at: moment('at').notNull(),
  /** Milliseconds since the event before in this sitting; null after a reload. */
  since: int('since'),
  receivedAt: moment('received_at').notNull(),
  clockOffMs: int('clock_off_ms').notNull(),
  late: boolean('late').notNull(),
  sha: sha('sha').notNull(),
  /** The body as canonical text; text and not JSON, so that its hash can be taken again. */
  body: longtext('body').notNull(),
}, t => [
  primaryKey({ name: 'pk_piece_events', columns: [t.studioId, t.pieceId, t.n] }),
  uniqueIndex('u_piece_events_id').on(t.studioId, t.id),
  uniqueIndex('u_piece_events_seq').on(t.studioId, t.pieceId, t.tablet, t.seq),
  foreignKey({ name: 'fk_piece_events_piece', columns: [t.studioId, t.pieceId], foreignColumns: [pieces.studioId, pieces.id] }),
  foreignKey({ name: 'fk_piece_events_actor', columns: [t.studioId, t.actor], foreignColumns: [memberships.studioId, memberships.personId] }),
])

export const setAsideEvents = mysqlTable('set_aside_events', {
  studioId: ulid('studio_id').notNull(),
  id: ulid('id').notNull(),
  pieceId: ulid('piece_id').notNull(),
  tablet: ulid('tablet').notNull(),
  seq: int('seq').notNull(),
  reason: varchar('reason', { length: 60 }).notNull(),
  body: longtext('body').notNull(),
  receivedAt: moment('received_at').notNull(),
}, t => [primaryKey({ name: 'pk_set_aside_events', columns: [t.studioId, t.id] }), index('i_set_aside_piece').on(t.studioId, t.pieceId)])

/** A projection of events, for calibration and faults; rebuilt by command. */
export const readings = mysqlTable('readings', {
  studioId: ulid('studio_id').notNull(),
  id: ulid('id').notNull(),
  pieceId: ulid('piece_id').notNull(),
  n: int('n').notNull(),
  place: int('place').notNull(),
  turn: code(100)('turn'),
  reading: code(31)('reading').notNull(),
  value: decimal('value', { precision: 12, scale: 4 }).notNull(),
  unit: varchar('unit', { length: 8 }).notNull(),
  typed: varchar('typed', { length: 40 }).notNull(),
  outside: boolean('outside').notNull(),
}, t => [
  primaryKey({ name: 'pk_readings', columns: [t.studioId, t.id] }),
  uniqueIndex('u_readings_event').on(t.studioId, t.pieceId, t.n, t.place),
  foreignKey({ name: 'fk_readings_piece', columns: [t.studioId, t.pieceId], foreignColumns: [pieces.studioId, pieces.id] }),
])

export const photos = mysqlTable('photos', {
  studioId: ulid('studio_id').notNull(),
  /** Made on the tablet. */
  id: ulid('id').notNull(),
  pieceId: ulid('piece_id').notNull(),
  turn: code(100)('turn'),
  for: mysqlEnum('for', PHOTO_FOR).notNull(),
  claimedSha: sha('claimed_sha').notNull(),
  state: mysqlEnum('state', PHOTO_STATES).notNull(),
  fileSha: sha('file_sha'),
  bytes: int('bytes').notNull(),
  width: int('width').notNull(),
  height: int('height').notNull(),
  hasScale: boolean('has_scale'),
}, t => [
  primaryKey({ name: 'pk_photos', columns: [t.studioId, t.id] }),
  index('i_photos_piece').on(t.studioId, t.pieceId),
  foreignKey({ name: 'fk_photos_piece', columns: [t.studioId, t.pieceId], foreignColumns: [pieces.studioId, pieces.id] }),
])

/** A look asked for at the bench; `about` says why. */
export const looks = mysqlTable('looks', {
  studioId: ulid('studio_id').notNull(),
  id: ulid('id').notNull(),
  pieceId: ulid('piece_id').notNull(),
  turn: code(100)('turn'),
  about: varchar('about', { length: 10 }).notNull(),
  askedAt: moment('asked_at').notNull(),
  givenAt: moment('given_at'),
  /** Who gave it; null while it waits, and when it was let go. */
  by: ulid('by'),
}, t => [
  primaryKey({ name: 'pk_looks', columns: [t.studioId, t.id] }),
  index('i_looks_waiting').on(t.studioId, t.givenAt, t.askedAt),
  foreignKey({ name: 'fk_looks_piece', columns: [t.studioId, t.pieceId], foreignColumns: [pieces.studioId, pieces.id] }),
])

/** Every free text of a record; the record holds the id and SHA-256(salt + text), so that the text can be erased. */
export const words = mysqlTable('words', {
  studioId: ulid('studio_id').notNull(),
  id: ulid('id').notNull(),
  salt: sha('salt').notNull(),
  text: varchar('text', { length: 2000 }).notNull(),
  by: ulid('by').notNull(),
  at: moment('at').notNull(),
  erasedAt: moment('erased_at'),
}, t => [primaryKey({ name: 'pk_words', columns: [t.studioId, t.id] })])

export const notes = mysqlTable('notes', {
  studioId: ulid('studio_id').notNull(),
  id: ulid('id').notNull(),
  personId: ulid('person_id').notNull(),
  pieceId: ulid('piece_id'),
  wordsId: ulid('words_id').notNull(),
  danger: boolean('danger').notNull(),
  at: moment('at').notNull(),
  shownAt: moment('shown_at'),
}, t => [
  primaryKey({ name: 'pk_notes', columns: [t.studioId, t.id] }),
  index('i_notes_person').on(t.studioId, t.personId, t.shownAt),
  foreignKey({ name: 'fk_notes_person', columns: [t.studioId, t.personId], foreignColumns: [memberships.studioId, memberships.personId] }),
])
