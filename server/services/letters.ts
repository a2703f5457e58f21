import { eq } from 'drizzle-orm'
import { levelWords, SIGNED_LEVELS } from '../../shared/judging/levels'
import type { MailKind } from '../../shared/schemas/lists'
import type { Db } from '../db/client'
import { studios } from '../db/schema/studio'
import { currentNames, nameIn } from './names'
import { freshSecret } from './tokens'
import { readWords } from './words'

export interface Letter { subject: string, text: string, html: string }
export interface QueuedRow { studioId: string | null, kind: MailKind, body: Record<string, unknown> }

interface Told { subject: string, lines: string[], go?: { says: string, path: string } }
interface Facts { by: string, words: string | null, of: (key: string) => string }

const OUTCOME_WORDS: Record<string, string> = { 'kept': 'kept', 'sent-back': 'sent back', 'mend': 'to be mended' }

const LETTERS: Record<MailKind, (facts: Facts) => Told> = {
  'invitation': ({ by, of }) => ({ subject: `${of('studio')} invites you to its bench`, lines: [`${by} of ${of('studio')} invites you.`, 'Choose a password, and you can come in. The link is good for 14 days and works once.'], go: { says: 'Come in', path: `/come-in/${of('token')}` } }),
  'reset': ({ of }) => ({ subject: 'A new password', lines: ['Someone, you we hope, asked for a new password for this address.', 'The link is good for one hour and works once. If it was not you, leave it: nothing changes.'], go: { says: 'Choose a new password', path: `/come-in/${of('token')}` } }),
  'email-change': ({ of }) => ({ subject: 'Your e-mail, and a password', lines: [`You gave this e-mail at ${of('studio')}, to come in without a card.`, 'Choose a password, and it is yours. The link is good for two days and works once. If it was not you, leave it: nothing changes.'], go: { says: 'Choose a password', path: `/come-in/${of('token')}` } }),
  'look-given': ({ by, of, words }) => ({ subject: `${by} looked at ${of('piece')}`, lines: [`${by} gave the look you asked for on ${of('piece')}.`, ...words ? [`“${words}”`] : []] }),
  'judged': ({ by, of, words }) => ({ subject: `${of('piece')} was judged`, lines: [`${by} judged ${of('piece')}, ${of('lesson')}: ${OUTCOME_WORDS[of('outcome')] ?? of('outcome')}.`, ...words ? [`“${words}”`] : []], go: { says: 'Your bench', path: '/bench' } }),
  'signed': ({ by, of }) => ({ subject: `${of('lesson')}: signed at ${of('level')}`, lines: [`${by} signed you in ${of('lesson')} at ${levelOf(of('level'))}.`, ...of('secondName') === 'true' ? ['It stands as one signature until a second name is added.'] : []], go: { says: 'Your bench', path: '/bench' } }),
  'second-name': ({ by, of }) => ({ subject: `${of('lesson')}: a second name`, lines: [`${by} put a second name to your ${levelOf(of('level'))} in ${of('lesson')}.`], go: { says: 'Your bench', path: '/bench' } }),
  'hold-released': ({ by, of, words }) => ({ subject: `${of('lesson')}: a hold was let go`, lines: [`${by} let a hold point of ${of('lesson')}, revision ${of('revision')}, step ${of('turn')}, go at the bench.`, ...words ? [`“${words}”`] : [], 'Look whether the question is wrong.'], go: { says: 'The lessons', path: '/lessons' } }),
}

const levelOf = (level: string): string => { const known = SIGNED_LEVELS.find(one => String(one) === level); return known ? `${levelWords(known)}` : `level ${level}` }

/** The letter a queued row says: first who and what, a way back, and the title block at its foot. Null where its link is used up. */
export async function letterOf(db: Db, row: QueuedRow, publicUrl: string, now: Date): Promise<Letter | null> {
  const body = { ...row.body }
  if (typeof body.token === 'string') {
    const secret = await freshSecret(db, body.token, now)
    if (!secret) return null
    body.token = secret
  }
  const of = (key: string): string => { const value = body[key]; return value === null || value === undefined ? '' : String(value) }
  const [studio] = row.studioId ? await db.select({ name: studios.name }).from(studios).where(eq(studios.id, row.studioId)) : []
  const names = of('by') ? await currentNames(db, [of('by')]) : new Map()
  const words = of('words') && row.studioId ? (await readWords(db, row.studioId, [of('words')])).get(of('words')) ?? null : null
  const told = LETTERS[row.kind]({ by: of('by') ? nameIn(names, of('by')) : 'Your studio', words, of: key => key === 'studio' ? studio?.name ?? 'your studio' : of(key) })
  return { subject: told.subject, ...written(told, studio?.name ?? 'Thirdhand', publicUrl, now) }
}

function written({ subject, lines, go }: Told, from: string, publicUrl: string, at: Date): { text: string, html: string } {
  const link = go ? `${publicUrl.replace(/\/$/, '')}${go.path}` : null
  const block = [['from', from], ['about', subject], ['date', at.toISOString().slice(0, 10)], ['sheet', '1 of 1']] as const
  const text = [...lines, ...go && link ? ['', `${go.says}: ${link}`] : [], '', block.map(([key, value]) => `${key}: ${value}`).join('  |  ')].join('\n')
  const cells = block.map(([key, value]) => `<td style="border:1px solid #1c1a17;padding:5px 12px;font-size:14px">${key}<br><b>${escaped(value)}</b></td>`).join('')
  const html = `<!doctype html><html lang="en"><body style="font-family:sans-serif;font-size:18px;line-height:1.5;color:#1c1a17;background:#fffdf8;padding:24px">${lines.map(line => `<p>${escaped(line)}</p>`).join('')}${go && link ? `<p><a href="${escaped(link)}" style="color:#1c1a17">${escaped(go.says)}</a></p>` : ''}<table style="border-collapse:collapse;margin-top:40px"><tr>${cells}</tr></table></body></html>`
  return { text, html }
}

const escaped = (text: string): string => text.replace(/[&<>"']/g, sign => `&#${sign.charCodeAt(0)};`)
