import { and, desc, eq, isNull } from 'drizzle-orm'
import { dayIn } from '../../shared/bench/day'
import type { DbOrTx } from '../db/client'
import { classes, classPeople, memberships, studios } from '../db/schema/studio'
import type { Actor } from './actor'
import { found } from './refuse'

/** The latest stay of a person in a class, and today in the studio. */
async function latestStay(tx: DbOrTx, who: Actor, classId: string, personId: string, now: Date) {
  const [there] = await tx.select({ zone: studios.zone }).from(classes).innerJoin(studios, eq(studios.id, classes.studioId)).where(and(eq(classes.studioId, who.studioId), eq(classes.id, classId)))
  const [member] = await tx.select({ id: memberships.id }).from(memberships).where(and(eq(memberships.studioId, who.studioId), eq(memberships.personId, personId), isNull(memberships.leftAt))).for('update')
  const { zone } = found(there)
  found(member)
  const [latest] = await tx.select({ fromOn: classPeople.fromOn, untilOn: classPeople.untilOn }).from(classPeople)
    .where(and(eq(classPeople.studioId, who.studioId), eq(classPeople.classId, classId), eq(classPeople.personId, personId))).orderBy(desc(classPeople.fromOn)).limit(1)
  return { today: dayIn(zone, now), latest }
}

/** Puts a person of the studio into a class from today on. Nothing happens where they are in it. */
export async function putInClass(tx: DbOrTx, who: Actor, classId: string, personId: string, now: Date): Promise<void> {
  const { today, latest } = await latestStay(tx, who, classId, personId, now)
  if (latest && (latest.untilOn === null || latest.untilOn >= today)) {
    await tx.update(classPeople).set({ untilOn: null }).where(stay(who, classId, personId, latest.fromOn))
    return
  }
  await tx.insert(classPeople).values({ studioId: who.studioId, classId, personId, fromOn: today })
}

/** Takes a person out of a class: yesterday was their last day in it; who came today was never in it. */
export async function takeOutOfClass(tx: DbOrTx, who: Actor, classId: string, personId: string, now: Date): Promise<void> {
  const { today, latest } = await latestStay(tx, who, classId, personId, now)
  if (!latest || latest.untilOn !== null) return
  const here = stay(who, classId, personId, latest.fromOn)
  if (latest.fromOn >= today) await tx.delete(classPeople).where(here)
  else await tx.update(classPeople).set({ untilOn: dayBefore(today) }).where(here)
}

const stay = (who: Actor, classId: string, personId: string, fromOn: string) =>
  and(eq(classPeople.studioId, who.studioId), eq(classPeople.classId, classId), eq(classPeople.personId, personId), eq(classPeople.fromOn, fromOn))

const dayBefore = (day: string): string => new Date(Date.parse(`${day}T00:00:00Z`) - 86_400_000).toISOString().slice(0, 10)
