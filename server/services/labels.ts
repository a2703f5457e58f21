import { and, count, desc, eq, like } from 'drizzle-orm'
import type { Tx } from '../db/client'
import { lessons } from '../db/schema/lessons'
import { personNames } from '../db/schema/people'
import { pieces } from '../db/schema/pieces'
import type { Actor } from './actor'

/** First letters of the first two words of a lesson's slug: wrapped-loop-link is WL. */
export function lessonLetters(slug: string): string {
  return slug.split('-').slice(0, 2).map(word => word.slice(0, 1)).join('').toUpperCase()
}

/** A name's first word in plain capitals, eight at most. */
export function nameLetters(name: string): string {
  const plain = name.normalize('NFKD').replace(/[^\p{L} ]/gu, '').toUpperCase().split(' ')[0]?.replace(/[^A-Z]/g, '') ?? ''
  return plain.slice(0, 8) || 'PIECE'
}

/** What is written on the bag: AMY-WL-3. Two people of one name are told apart by a number behind it: AMY2-WL-1. */
export async function labelFor(tx: Tx, who: Actor, lessonId: string): Promise<string> {
  const [lesson] = await tx.select({ slug: lessons.slug }).from(lessons).where(and(eq(lessons.studioId, who.studioId), eq(lessons.id, lessonId)))
  const [named] = await tx.select({ name: personNames.name }).from(personNames).where(eq(personNames.personId, who.personId)).orderBy(desc(personNames.version)).limit(1)
  const [made] = await tx.select({ count: count() }).from(pieces).where(and(eq(pieces.studioId, who.studioId), eq(pieces.personId, who.personId), eq(pieces.lessonId, lessonId)))
  const letters = lessonLetters(lesson?.slug ?? '')
  const number = (made?.count ?? 0) + 1
  const name = nameLetters(named?.name ?? '')
  for (let twin = 1; ; twin++) {
    const label = `${name}${twin > 1 ? twin : ''}-${letters}-${number}`
    const taken = await tx.select({ id: pieces.id }).from(pieces).where(and(eq(pieces.studioId, who.studioId), like(pieces.label, label))).limit(1)
    if (taken.length === 0) return label
  }
}
