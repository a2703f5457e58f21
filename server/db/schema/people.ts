import { foreignKey, index, int, json, mysqlEnum, mysqlTable, primaryKey, tinyint, uniqueIndex, varchar } from 'drizzle-orm/mysql-core'
import { type AgeBand, GROUNDS, HANDS, MAIL_KINDS, MAIL_STATES, type Role, TOKEN_KINDS } from '../../../shared/schemas/lists'
import { moment, sha, ulid } from './columns'

export const people = mysqlTable('people', {
  id: ulid('id').primaryKey(),
  email: varchar('email', { length: 254 }),
  emailKey: varchar('email_key', { length: 254 }),
  passwordHash: varchar('password_hash', { length: 255 }),
  /** Goes up to end every session of the person at once. */
  epoch: int('epoch').notNull().default(0),
  hand: mysqlEnum('hand', HANDS).notNull().default('right'),
  textSize: int('text_size').notNull().default(100),
  ground: mysqlEnum('ground', GROUNDS).notNull().default('paper'),
  wants: json('wants').$type<Record<string, unknown>>().notNull(),
  erasedAt: moment('erased_at'),
}, t => [uniqueIndex('u_people_email').on(t.emailKey)])

/** The only place a name is kept; records hold (person_id, name_version). */
export const personNames = mysqlTable('person_names', {
  personId: ulid('person_id').notNull(),
  version: int('version').notNull(),
  name: varchar('name', { length: 120 }).notNull(),
  fromAt: moment('from_at').notNull(),
}, t => [
  primaryKey({ name: 'pk_person_names', columns: [t.personId, t.version] }),
  foreignKey({ name: 'fk_person_names_person', columns: [t.personId], foreignColumns: [people.id] }),
])

export const sessions = mysqlTable('sessions', {
  id: ulid('id').primaryKey(),
  personId: ulid('person_id').notNull(),
  /** The studio in hand. */
  studioId: ulid('studio_id'),
  created: moment('created').notNull(),
  lastSeen: moment('last_seen').notNull(),
  ends: moment('ends').notNull(),
  revokedAt: moment('revoked_at'),
  /** Begun with a start card of this studio: opens no other, and no account. */
  cardStudio: ulid('card_studio'),
  agent: varchar('agent', { length: 200 }).notNull().default(''),
}, t => [
  index('i_sessions_person').on(t.personId),
  foreignKey({ name: 'fk_sessions_person', columns: [t.personId], foreignColumns: [people.id] }),
])

/** A place in a studio as it is offered by mail. */
export interface Offer { name: string, roles: Role[], ageBand: AgeBand, classId: string | null, by: string }

export const tokens = mysqlTable('tokens', {
  id: ulid('id').primaryKey(),
  kind: mysqlEnum('kind', TOKEN_KINDS).notNull(),
  hash: sha('hash').notNull(),
  personId: ulid('person_id'),
  emailKey: varchar('email_key', { length: 254 }),
  studioId: ulid('studio_id'),
  ends: moment('ends').notNull(),
  usedAt: moment('used_at'),
  /** What an invitation offers; nothing of it is so until it is taken. */
  offer: json('offer').$type<Offer>(),
}, t => [uniqueIndex('u_tokens_hash').on(t.hash)])

/** Tries by account or address (hashed): a limit on guessing that survives a restart. */
export const attempts = mysqlTable('attempts', {
  key: sha('key').primaryKey(),
  points: int('points').notNull(),
  ends: moment('ends').notNull(),
})

export const mail = mysqlTable('mail', {
  id: ulid('id').primaryKey(),
  studioId: ulid('studio_id'),
  toPerson: ulid('to_person'),
  /** Only where there is no person yet (an invitation); erased once sent. */
  toAddress: varchar('to_address', { length: 254 }),
  kind: mysqlEnum('kind', MAIL_KINDS).notNull(),
  body: json('body').$type<Record<string, unknown>>().notNull(),
  state: mysqlEnum('state', MAIL_STATES).notNull().default('waits'),
  tries: tinyint('tries').notNull().default(0),
  nextAt: moment('next_at').notNull(),
  sentAt: moment('sent_at'),
  dedupeKey: varchar('dedupe_key', { length: 120 }),
}, t => [index('i_mail_next').on(t.state, t.nextAt), uniqueIndex('u_mail_dedupe').on(t.dedupeKey)])

/** Not chained, purged after 180 days. Holds no secret and no message. */
export const securityLog = mysqlTable('security_log', {
  id: ulid('id').primaryKey(),
  at: moment('at').notNull(),
  person: ulid('person'),
  address: varchar('address', { length: 64 }).notNull(),
  what: varchar('what', { length: 60 }).notNull(),
}, t => [index('i_security_log_at').on(t.at)])
