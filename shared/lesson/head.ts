/** The front matter's entries as the head of a lesson. */
import { nearNames, orNear } from './findings'
import type { Entry } from './front'
import { readFigures, readReadings, readSizes } from './head-figures'
import { readCriteria, readMaterials } from './head-judging'
import { days, find, minutes, Reader } from './read'
import { CRAFTS, type Lesson, PERMISSIONS } from './schema'
import { slugOf } from './slugs'
import type { Findings } from './findings'

export const FRONT_KEYS = ['title', 'craft', 'piece', 'covers', 'not_for', 'at_stake', 'needs', 'permissions', 'torch', 'time', 'keeps', 'expected', 'object_may_mirror', 'tools', 'materials', 'sizes', 'figures', 'readings',
  'criteria', 'closing']
const REQUIRED = ['title', 'craft', 'piece', 'time', 'criteria']

export type Head = Omit<Lesson, 'opening' | 'faults' | 'parts'>

export function readHead(entries: readonly Entry[], findings: Findings, missing: boolean): Head {
  const read = new Reader(findings)
  read.unknownKeys(entries, FRONT_KEYS, key => orNear(nearNames(key, FRONT_KEYS)))
  if (!missing) for (const key of REQUIRED) if (!find(entries, key)) findings.add('front-missing', { from: 0, to: 3 }, `Missing in the front matter: ${key}.`)
  const permissions = read.texts(find(entries, 'permissions')).flatMap((text) => {
    const found = PERMISSIONS.find(one => one === text)
    if (!found) read.bad(find(entries, 'permissions') ?? { key: 'permissions', keyAt: { from: 0, to: 0 }, from: 0, to: 0, value: { t: 'nothing', at: { from: 0, to: 0 } } }, `${text} is no permission. There is ${PERMISSIONS.join(', ')}.`)
    return found ? [found] : []
  })
  const sizes = readSizes(read, find(entries, 'sizes'))
  return {
    format: 1, title: read.text(find(entries, 'title')) ?? '', craft: read.oneOf(find(entries, 'craft'), CRAFTS) ?? 'studio', piece: read.text(find(entries, 'piece')) ?? '',
    covers: read.text(find(entries, 'covers')) ?? '', notFor: read.text(find(entries, 'not_for')) ?? '', atStake: read.text(find(entries, 'at_stake')) ?? '', needs: read.texts(find(entries, 'needs')), permissions,
    torch: read.text(find(entries, 'torch')), time: readTime(read, find(entries, 'time')), keeps: readKeeps(read, find(entries, 'keeps')), expected: readExpected(read, find(entries, 'expected')),
    objectMayMirror: read.yesNo(find(entries, 'object_may_mirror')) ?? true, tools: read.texts(find(entries, 'tools')), materials: readMaterials(read, find(entries, 'materials')), sizes,
    figures: readFigures(read, find(entries, 'figures')), readings: readReadings(read, find(entries, 'readings')), criteria: readCriteria(read, find(entries, 'criteria')),
    closing: readClosing(read, find(entries, 'closing')),
  }
}

function readTime(read: Reader, entry: Entry | undefined): Lesson['time'] {
  const entries = read.map(entry)
  const of = (key: string): number => {
    const found = find(entries, key)
    const text = read.text(found)
    const value = text === null ? null : minutes(text)
    if (found && value === null) read.bad(found, `${key}: a time, as 25 min or 4 h.`)
    return value ?? 0
  }
  return { maker: of('maker'), first: of('first'), later: of('later') }
}

function readKeeps(read: Reader, entry: Entry | undefined): number {
  const text = read.text(entry)
  const value = text === null ? null : days(text)
  if (entry && value === null) read.bad(entry, 'keeps: a time, as 6 months.')
  return value ?? 183
}

function readExpected(read: Reader, entry: Entry | undefined): Lesson['expected'] {
  if (!entry) return null
  const entries = read.map(entry)
  const level = Number(read.text(find(entries, 'level')))
  const week = Number(read.text(find(entries, 'week')))
  if (Number.isInteger(level) && level >= 1 && level <= 5 && Number.isInteger(week) && week >= 1) return { level, week }
  read.bad(entry, 'expected: a level from 1 to 5 and a week, as { level: 3, week: 6 }.')
  return null
}

function readClosing(read: Reader, entry: Entry | undefined): Lesson['closing'] {
  const taken = new Set<string>()
  return read.texts(entry).map((says) => {
    const key = slugOf(says, taken)
    taken.add(key)
    return { key, says }
  })
}
