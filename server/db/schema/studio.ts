import { date, foreignKey, int, json, longtext, mysqlEnum, mysqlTable, primaryKey, tinyint, uniqueIndex, varchar } from 'drizzle-orm/mysql-core'
import { AGE_BANDS, RELATION_KINDS, ROLE_ACTS, ROLES } from '../../../shared/schemas/lists'
import { moment, roleSet, sha, ulid } from './columns'
import { people } from './people'

export const studios = mysqlTable('studios', {
  id: ulid('id').primaryKey(),
  slug: varchar('slug', { length: 60 }).notNull(),
  name: varchar('name', { length: 120 }).notNull(),
  /** IANA time zone; a day of the studio is a day there. */
  zone: varchar('zone', { length: 60 }).notNull(),
  timeMade: moment('time_made').notNull(),
}, t => [uniqueIndex('u_studios_slug').on(t.slug)])

export const memberships = mysqlTable('memberships', {
  studioId: ulid('studio_id').notNull(),
  id: ulid('id').notNull(),
  personId: ulid('person_id').notNull(),
  /** The number that stands for the person in records shown outside. */
  trailNo: int('trail_no').notNull(),
  ageBand: mysqlEnum('age_band', AGE_BANDS).notNull().default('adult'),
  /** Sealed; never shown at the bench. */
  guardian: longtext('guardian'),
  /** Folded from membership_roles in the same transaction; the guards read this. */
  roles: roleSet('roles').notNull(),
  joined: moment('joined').notNull(),
  leftAt: moment('left_at'),
}, t => [
  primaryKey({ name: 'pk_memberships', columns: [t.studioId, t.id] }),
  uniqueIndex('u_memberships_person').on(t.studioId, t.personId),
  uniqueIndex('u_memberships_trail').on(t.studioId, t.trailNo),
  foreignKey({ name: 'fk_memberships_studio', columns: [t.studioId], foreignColumns: [studios.id] }),
  foreignKey({ name: 'fk_memberships_person', columns: [t.personId], foreignColumns: [people.id] }),
])


export const membershipRoles = mysqlTable('membership_roles', {
  studioId: ulid('studio_id').notNull(),
  id: ulid('id').notNull(),
  personId: ulid('person_id').notNull(),
  role: mysqlEnum('role', ROLES).notNull(),
  act: mysqlEnum('act', ROLE_ACTS).notNull(),
  by: ulid('by').notNull(),
  at: moment('at').notNull(),
}, t => [
  primaryKey({ name: 'pk_membership_roles', columns: [t.studioId, t.id] }),
  foreignKey({ name: 'fk_membership_roles_person', columns: [t.studioId, t.personId], foreignColumns: [memberships.studioId, memberships.personId] }),
])

/** The latest row not after the day asked for counts; "as it stood" needs the settings of that day. */
export const settings = mysqlTable('settings', {
  studioId: ulid('studio_id').notNull(),
  id: ulid('id').notNull(),
  key: varchar('key', { length: 60 }).notNull(),
  value: json('value').$type<unknown>().notNull(),
  fromAt: moment('from_at').notNull(),
  by: ulid('by').notNull(),
}, t => [primaryKey({ name: 'pk_settings', columns: [t.studioId, t.id] })])

export const classes = mysqlTable('classes', {
  studioId: ulid('studio_id').notNull(),
  id: ulid('id').notNull(),
  name: varchar('name', { length: 120 }).notNull(),
  termFrom: date('term_from', { mode: 'string' }).notNull(),
  termTo: date('term_to', { mode: 'string' }).notNull(),
  /** 1 Monday to 7 Sunday (ISO 8601). */
  weekday: tinyint('weekday').notNull(),
}, t => [
  primaryKey({ name: 'pk_classes', columns: [t.studioId, t.id] }),
  foreignKey({ name: 'fk_classes_studio', columns: [t.studioId], foreignColumns: [studios.id] }),
])

export const classPeople = mysqlTable('class_people', {
  studioId: ulid('studio_id').notNull(),
  classId: ulid('class_id').notNull(),
  personId: ulid('person_id').notNull(),
  fromOn: date('from_on', { mode: 'string' }).notNull(),
  untilOn: date('until_on', { mode: 'string' }),
}, t => [
  primaryKey({ name: 'pk_class_people', columns: [t.studioId, t.classId, t.personId, t.fromOn] }),
  foreignKey({ name: 'fk_class_people_class', columns: [t.studioId, t.classId], foreignColumns: [classes.studioId, classes.id] }),
  foreignKey({ name: 'fk_class_people_person', columns: [t.studioId, t.personId], foreignColumns: [memberships.studioId, memberships.personId] }),
])

export const relations = mysqlTable('relations', {
  studioId: ulid('studio_id').notNull(),
  id: ulid('id').notNull(),
  personA: ulid('person_a').notNull(),
  personB: ulid('person_b').notNull(),
  kind: mysqlEnum('kind', RELATION_KINDS).notNull(),
  declaredOn: date('declared_on', { mode: 'string' }).notNull(),
}, t => [
  primaryKey({ name: 'pk_relations', columns: [t.studioId, t.id] }),
  foreignKey({ name: 'fk_relations_a', columns: [t.studioId, t.personA], foreignColumns: [memberships.studioId, memberships.personId] }),
  foreignKey({ name: 'fk_relations_b', columns: [t.studioId, t.personB], foreignColumns: [memberships.studioId, memberships.personId] }),
])

export const tablets = mysqlTable('tablets', {
  studioId: ulid('studio_id').notNull(),
  id: ulid('id').notNull(),
  name: varchar('name', { length: 40 }).notNull(),
  secretHash: sha('secret_hash'),
  enrolled: moment('enrolled'),
  retired: moment('retired'),
}, t => [primaryKey({ name: 'pk_tablets', columns: [t.studioId, t.id] })])
