/** A studio of its own for the tests of writing lessons, with files in a folder of their own. */
import { mkdtemp, readdir, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { isError } from 'h3'
import { ulid } from 'ulid'
import type { Role } from '#shared/schemas/lists'
import { type Db, openDatabase } from '#server/db/client'
import { people, personNames } from '#server/db/schema/people'
import { memberships, studios } from '#server/db/schema/studio'
import type { Actor } from '#server/services/actor'
import { readDraft, saveDraft } from '#server/services/drafts'
import { type Files, openFiles } from '#server/services/files'
import { putIntoUse } from '#server/services/into-use'
import { makeLesson } from '#server/services/lessons'
import { told } from './harness'

export const NOON = new Date('2026-03-17T12:00:00.000Z')
export const later = (minutes: number): Date => new Date(NOON.getTime() + minutes * 60_000)

export interface Desk { db: Db, files: Files, folder: string, close: () => Promise<void> }

/** The database the tests run on, and an empty folder for pictures. */
export async function openDesk(): Promise<Desk> {
  const { db, pool } = openDatabase(told('TEST_DATABASE_URL'), 12)
  const folder = await mkdtemp(join(tmpdir(), 'pictures-'))
  return { db, files: openFiles(folder), folder, close: async () => { await pool.end(); await rm(folder, { recursive: true, force: true }) } }
}

/** Every file below the folder. */
export async function filesIn(folder: string): Promise<string[]> {
  return (await readdir(folder, { recursive: true, withFileTypes: true })).filter(entry => entry.isFile()).map(entry => entry.name)
}

export interface Studio { studioId: string, ruth: Actor, imran: Actor, amy: Actor }

export async function makeStudio(db: Db): Promise<Studio> {
  const studioId = ulid()
  await db.insert(studios).values({ id: studioId, slug: `writing-${studioId.toLowerCase()}`, name: 'Tallow Yard Bench School', zone: 'Europe/London', timeMade: NOON })
  const add = async (name: string, trailNo: number, roles: Role[]): Promise<Actor> => {
    const personId = ulid()
    await db.insert(people).values({ id: personId, wants: {} })
    await db.insert(personNames).values({ personId, version: 1, name, fromAt: NOON })
    await db.insert(memberships).values({ studioId, id: ulid(), personId, trailNo, roles, joined: NOON })
    return { studioId, personId, roles }
  }
  return { studioId, ruth: await add('Ruth Calder', 1, ['instructor']), imran: await add('Imran Sethi', 2, ['instructor']), amy: await add('Amy Brandt', 3, ['apprentice']) }
}

/** The text of a lesson that is fit for use, with a step that has no key. */
export const GOOD = `---
title: Cut to length
craft: wire
piece: one length
covers: Round wire
not_for: Chain
at_stake: A short length
needs: []
permissions: []
time: { maker: 1 min, first: 5 min, later: 2 min }
keeps: 6 months
tools: [Flush cutter, Calliper, Eye protection]
sizes:
  wire: { ask: "Wire, measured", unit: wire, usual: 0.7 mm, from: 0.6 mm, to: 0.9 mm }
figures:
  cut: 60 mm + 2 * wire
readings:
  long: { ask: "Cut wire, end to end", unit: mm, is: cut, within: 0.5 mm, with: Calliper }
criteria:
  - { key: length, measure: long, say: Length as told }
closing: [Offcuts in the scrap tray]
---

A length of wire.

## Cut it

WARNING Cut wire flies and can blind
  Eye protection on. Keep a finger on the offcut and cut over the bin.

Cut {cut} of {wire} wire.

READING long
`

/** A lesson with a text in its draft. */
export async function lessonWith(db: Db, who: Actor, source: string, title = 'Cut to length'): Promise<{ id: string, etag: string }> {
  const { id } = await makeLesson(db, who, { id: ulid(), title, craft: 'wire' }, NOON)
  const { etag } = await readDraft(db, who, id)
  return { id, etag: (await saveDraft(db, who, id, { etag, source }, NOON)).etag }
}

/** Puts a lesson's draft into use as its next revision. */
export async function use(db: Db, who: Actor, id: string, at = NOON, note = 'Said better.'): Promise<{ id: string, number: number }> {
  const { etag, previous } = await readDraft(db, who, id)
  return (await putIntoUse(db, who, id, { id: ulid(), etag, effect: previous ? 'words' : 'first', note }, at)).revision
}

/** Status, sentence and data a piece of work was refused with. */
export async function refused(work: Promise<unknown>): Promise<{ status: number, says: string, data: unknown }> {
  try {
    await work
  }
  catch (error) {
    if (isError(error)) return { status: error.statusCode, says: error.message, data: error.data }
    throw error
  }
  throw new Error('Nothing was refused.')
}
