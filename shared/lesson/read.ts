/** Reading one value of the front matter, leaving a finding where it cannot be read. */
import type { Code, Findings, Place } from './findings'
import { readExpression } from './expression'
import type { Entry, Raw } from './front'
import type { Node } from './schema'

export class Reader {
  constructor(readonly findings: Findings) {}

  text(entry: Entry | undefined): string | null {
    if (!entry) return null
    const { value } = entry
    if (value.t === 'text') return value.v.trim()
    if (value.t === 'number') return value.text
    this.bad(entry, `${entry.key}: words are wanted here.`)
    return null
  }

  /** The words of a list; a single word is a list of one. */
  texts(entry: Entry | undefined): string[] {
    if (!entry || entry.value.t === 'nothing') return []
    const list = entry.value.t === 'list' ? entry.value.v : [entry.value]
    return list.flatMap((raw) => {
      if (raw.t === 'text') return [raw.v.trim()]
      if (raw.t === 'number') return [raw.text]
      this.findings.add('front-value', raw.at, `${entry.key}: a list of words is wanted here.`)
      return []
    })
  }

  oneOf<T extends string>(entry: Entry | undefined, list: readonly T[]): T | null {
    const text = this.text(entry)
    if (!entry || text === null) return null
    const found = list.find(one => one === text)
    if (found === undefined) this.bad(entry, `${entry.key}: ${text} is none of ${list.join(', ')}.`)
    return found ?? null
  }

  /** `yes` and `no` are words in YAML 1.2. */
  yesNo(entry: Entry | undefined): boolean | null {
    const text = this.text(entry)
    if (!entry || text === null) return null
    if (text === 'yes' || text === 'true') return true
    if (text === 'no' || text === 'false') return false
    this.bad(entry, `${entry.key}: yes or no.`)
    return null
  }

  map(entry: Entry | undefined): Entry[] {
    if (!entry || entry.value.t === 'nothing') return []
    if (entry.value.t === 'map') return entry.value.v
    this.bad(entry, `${entry.key}: names with values are wanted here.`)
    return []
  }

  maps(entry: Entry | undefined): { entries: Entry[], at: Place }[] {
    if (!entry || entry.value.t === 'nothing') return []
    if (entry.value.t !== 'list') { this.bad(entry, `${entry.key}: a list is wanted here.`); return [] }
    return entry.value.v.flatMap((raw: Raw) => {
      if (raw.t === 'map') return [{ entries: raw.v, at: raw.at }]
      this.findings.add('front-value', raw.at, `${entry.key}: each line of this list has names with values, as { name: ... }.`)
      return []
    })
  }

  /** An expression; null (with its finding) when it cannot be read. */
  expression(text: string, at: Place): Node | null {
    const read = readExpression(text)
    if (read.ok) return read.node
    this.findings.add(read.code, at, read.says)
    return null
  }

  node(entry: Entry | undefined): Node | null {
    const text = this.text(entry)
    return entry && text !== null ? this.expression(text, entry.value.at) : null
  }

  bad(entry: Entry, message: string, code: Code = 'front-value'): void {
    this.findings.add(code, entry.value.at, message)
  }

  /** Names of a map that are none of these. */
  unknownKeys(entries: readonly Entry[], known: readonly string[], near: (key: string) => string): void {
    for (const entry of entries) if (!known.includes(entry.key)) this.findings.add('yaml-key', entry.keyAt, `“${entry.key}” is not known here.${near(entry.key)}`)
  }
}

export const find = (entries: readonly Entry[], key: string): Entry | undefined => entries.find(entry => entry.key === key)

const SECONDS: Record<string, number> = { s: 1, sec: 1, min: 60, minute: 60, minutes: 60, h: 3600, hour: 3600, hours: 3600 }
const DAYS: Record<string, number> = { day: 1, days: 1, week: 7, weeks: 7, month: 30.4375, months: 30.4375, year: 365.25, years: 365.25 }

/** `25 min`, `4 h` in minutes; null when it is no time. */
export function minutes(text: string): number | null {
  const match = /^(\d+(?:\.\d+)?)\s*([a-z]+)$/.exec(text.trim())
  const unit = match?.[2] ? SECONDS[match[2]] : undefined
  return match?.[1] && unit ? Number(match[1]) * unit / 60 : null
}

/** `6 months` in days, a month being a twelfth of 365.25 days; null when it is no time. */
export function days(text: string): number | null {
  const match = /^(\d+(?:\.\d+)?)\s*([a-z]+)$/.exec(text.trim())
  const unit = match?.[2] ? DAYS[match[2]] : undefined
  return match?.[1] && unit ? Math.round(Number(match[1]) * unit) : null
}
