import { foreignKey, index, int, json, mysqlEnum, mysqlTable, primaryKey, tinyint, uniqueIndex, varchar } from 'drizzle-orm/mysql-core'
import type { Lesson } from '../../../shared/lesson/schema'
import { CRAFTS } from '../../../shared/lesson/schema'
import { EFFECTS, REVISION_ACTS } from '../../../shared/schemas/lists'
import { code, mediumtext, moment, sha, ulid } from './columns'
import { classes, memberships } from './studio'

export const lessons = mysqlTable('lessons', {
  studioId: ulid('studio_id').notNull(),
  id: ulid('id').notNull(),
  slug: code(40)('slug').notNull(),
  craft: mysqlEnum('craft', CRAFTS).notNull(),
  owner: ulid('owner').notNull(),
  currentRevision: ulid('current_revision'),
  putAwayAt: moment('put_away_at'),
}, t => [
  primaryKey({ name: 'pk_lessons', columns: [t.studioId, t.id] }),
  uniqueIndex('u_lessons_slug').on(t.studioId, t.slug),
  foreignKey({ name: 'fk_lessons_owner', columns: [t.studioId, t.owner], foreignColumns: [memberships.studioId, memberships.personId] }),
])

export const drafts = mysqlTable('drafts', {
  studioId: ulid('studio_id').notNull(),
  id: ulid('id').notNull(),
  lessonId: ulid('lesson_id').notNull(),
  source: mediumtext('source').notNull(),
  savedBy: ulid('saved_by').notNull(),
  savedAt: moment('saved_at').notNull(),
  baseRevision: ulid('base_revision'),
  /** Changes with every save; a save names the one it began from. */
  etag: ulid('etag').notNull(),
}, t => [
  primaryKey({ name: 'pk_drafts', columns: [t.studioId, t.id] }),
  uniqueIndex('u_drafts_lesson').on(t.studioId, t.lessonId),
  foreignKey({ name: 'fk_drafts_lesson', columns: [t.studioId, t.lessonId], foreignColumns: [lessons.studioId, lessons.id] }),
])

export const revisions = mysqlTable('revisions', {
  studioId: ulid('studio_id').notNull(),
  id: ulid('id').notNull(),
  lessonId: ulid('lesson_id').notNull(),
  number: int('number').notNull(),
  source: mediumtext('source').notNull(),
  /** Over the source and the sorted shas of its pictures; not over the compiled value. */
  sourceSha: sha('source_sha').notNull(),
  compiled: json('compiled').$type<Lesson>().notNull(),
  compiledSha: sha('compiled_sha').notNull(),
  format: tinyint('format').notNull(),
  compiler: int('compiler').notNull(),
  engine: int('engine').notNull(),
  title: varchar('title', { length: 200 }).notNull(),
  effect: mysqlEnum('effect', EFFECTS).notNull(),
  note: varchar('note', { length: 500 }).notNull(),
  by: ulid('by').notNull(),
  at: moment('at').notNull(),
}, t => [
  primaryKey({ name: 'pk_revisions', columns: [t.studioId, t.id] }),
  uniqueIndex('u_revisions_number').on(t.studioId, t.lessonId, t.number),
  uniqueIndex('u_revisions_source').on(t.studioId, t.lessonId, t.sourceSha),
  foreignKey({ name: 'fk_revisions_lesson', columns: [t.studioId, t.lessonId], foreignColumns: [lessons.studioId, lessons.id] }),
  foreignKey({ name: 'fk_revisions_by', columns: [t.studioId, t.by], foreignColumns: [memberships.studioId, memberships.personId] }),
])

export const revisionActs = mysqlTable('revision_acts', {
  studioId: ulid('studio_id').notNull(),
  id: ulid('id').notNull(),
  revisionId: ulid('revision_id').notNull(),
  act: mysqlEnum('act', REVISION_ACTS).notNull(),
  by: ulid('by').notNull(),
  at: moment('at').notNull(),
}, t => [
  primaryKey({ name: 'pk_revision_acts', columns: [t.studioId, t.id] }),
  foreignKey({ name: 'fk_revision_acts_revision', columns: [t.studioId, t.revisionId], foreignColumns: [revisions.studioId, revisions.id] }),
])

export const pictures = mysqlTable('pictures', {
  studioId: ulid('studio_id').notNull(),
  id: ulid('id').notNull(),
  /** Of the stored file. */
  sha: sha('sha').notNull(),
  kind: varchar('kind', { length: 40 }).notNull(),
  bytes: int('bytes').notNull(),
  width: int('width').notNull(),
  height: int('height').notNull(),
}, t => [primaryKey({ name: 'pk_pictures', columns: [t.studioId, t.id] }), uniqueIndex('u_pictures_sha').on(t.studioId, t.sha)])

/** Pictures that lie beside a draft, by name, before a revision takes them. */
export const draftPictures = mysqlTable('draft_pictures', {
  studioId: ulid('studio_id').notNull(),
  lessonId: ulid('lesson_id').notNull(),
  name: code(80)('name').notNull(),
  pictureId: ulid('picture_id').notNull(),
}, t => [
  primaryKey({ name: 'pk_draft_pictures', columns: [t.studioId, t.lessonId, t.name] }),
  foreignKey({ name: 'fk_draft_pictures_lesson', columns: [t.studioId, t.lessonId], foreignColumns: [lessons.studioId, lessons.id] }),
  foreignKey({ name: 'fk_draft_pictures_picture', columns: [t.studioId, t.pictureId], foreignColumns: [pictures.studioId, pictures.id] }),
])

export const revisionPictures = mysqlTable('revision_pictures', {
  studioId: ulid('studio_id').notNull(),
  revisionId: ulid('revision_id').notNull(),
  name: code(80)('name').notNull(),
  pictureId: ulid('picture_id').notNull(),
  alt: varchar('alt', { length: 500 }).notNull(),
  mirror: tinyint('mirror').notNull(),
}, t => [
  primaryKey({ name: 'pk_revision_pictures', columns: [t.studioId, t.revisionId, t.name] }),
  foreignKey({ name: 'fk_revision_pictures_revision', columns: [t.studioId, t.revisionId], foreignColumns: [revisions.studioId, revisions.id] }),
  foreignKey({ name: 'fk_revision_pictures_picture', columns: [t.studioId, t.pictureId], foreignColumns: [pictures.studioId, pictures.id] }),
])

export const revisionReads = mysqlTable('revision_reads', {
  studioId: ulid('studio_id').notNull(),
  revisionId: ulid('revision_id').notNull(),
  personId: ulid('person_id').notNull(),
  at: moment('at').notNull(),
}, t => [
  primaryKey({ name: 'pk_revision_reads', columns: [t.studioId, t.revisionId, t.personId] }),
  foreignKey({ name: 'fk_revision_reads_revision', columns: [t.studioId, t.revisionId], foreignColumns: [revisions.studioId, revisions.id] }),
  foreignKey({ name: 'fk_revision_reads_person', columns: [t.studioId, t.personId], foreignColumns: [memberships.studioId, memberships.personId] }),
])

export const classLessons = mysqlTable('class_lessons', {
  studioId: ulid('studio_id').notNull(),
  id: ulid('id').notNull(),
  classId: ulid('class_id').notNull(),
  lessonId: ulid('lesson_id').notNull(),
  place: int('place').notNull(),
}, t => [
  primaryKey({ name: 'pk_class_lessons', columns: [t.studioId, t.id] }),
  uniqueIndex('u_class_lessons_lesson').on(t.studioId, t.classId, t.lessonId),
  index('i_class_lessons_lesson').on(t.studioId, t.lessonId),
  foreignKey({ name: 'fk_class_lessons_class', columns: [t.studioId, t.classId], foreignColumns: [classes.studioId, classes.id] }),
  foreignKey({ name: 'fk_class_lessons_lesson', columns: [t.studioId, t.lessonId], foreignColumns: [lessons.studioId, lessons.id] }),
])
