/** Headings, keyword blocks and text as parts and steps. */
import { emptyStep, readStepFields, readPartFields } from './body-heads'
import { readBlock } from './body-blocks'
import type { Findings, Place } from './findings'
import { Reader } from './read'
import type { Block, Fault, Inline, Part, Step } from './schema'
import { type Item, scan } from './scan'
import { slugOf } from './slugs'
import { plainText, readInline, readText } from './text'

export const MOST_STEPS = 200

/** What rules look at besides the lesson: where things stand in the source. */
export interface Sighted {
  /** Steps in the order of the source with the items that stand in them. */
  steps: { step: Step, items: Item[], titleAt: Place, keyAt: Place | null }[]
  parts: { part: Part, keyAt: Place | null, at: Place }[]
  items: Item[]
}
export interface Body { opening: Block[], faults: Fault[], parts: Part[], sighted: Sighted }

export function readBody(source: string, from: number, findings: Findings): Body {
  const items = scan(source, from, findings)
  return new Builder(findings, items).build()
}

class Builder {
  private readonly read: Reader
  private readonly keys = new Set<string>()
  private readonly faultKeys = new Set<string>()
  private readonly body: Body

  constructor(private readonly findings: Findings, private readonly items: Item[]) {
    this.read = new Reader(findings)
    this.body = { opening: [], faults: [], parts: [], sighted: { steps: [], parts: [], items } }
  }

  build(): Body {
    this.takeToldKeys()
    for (const item of this.items) {
      if (item.t === 'heading') this.heading(item)
      else if (item.t === 'block') this.block(item)
      else this.text(item)
    }
    const { sighted } = this.body
    if (sighted.steps.length > MOST_STEPS) this.findings.add('too-long', sighted.steps[MOST_STEPS]?.titleAt ?? { from: 0, to: 0 }, `A lesson has at most ${MOST_STEPS} steps. Make two lessons of it.`)
    if (sighted.steps.length === 0 && this.items.length > 0) this.findings.add('step-missing', { from: this.items[0]?.at.from ?? 0, to: this.items[0]?.at.from ?? 0 }, 'A lesson has steps: a line that begins with ## and says what is done.')
    return this.body
  }

  /** Keys that are written stand first, so that a key made from a title never takes one of them. */
  private takeToldKeys(): void {
    for (const item of this.items) {
      if (item.t !== 'heading') continue
      const field = item.fields.find(one => one.key === 'key')
      if (!field) continue
      if (this.keys.has(field.value)) this.findings.add('duplicate-key', field.at, `The key ${field.value} stands twice. Parts and steps have one set of keys.`)
      this.keys.add(field.value)
    }
  }

  private heading(item: Extract<Item, { t: 'heading' }>): void {
    const title = readInline(item.title, this.findings, item.titleAt)
    const keyField = item.fields.find(one => one.key === 'key')
    const key = keyField?.value || slugOf(plainText(title), this.keys)
    this.keys.add(key)
    const range = this.findings.range(item.at.from, item.at.to)
    if (item.depth === 1) {
      const part: Part = { key, title, range, ...readPartFields(this.read, item), text: [], steps: [] }
      this.body.parts.push(part)
      this.body.sighted.parts.push({ part, keyAt: keyField?.at ?? null, at: item.at })
      return
    }
    const step: Step = { ...emptyStep(key, title, range), ...readStepFields(this.read, item) }
    this.partInHand().steps.push(step)
    this.faultKeys.clear()
    this.body.sighted.steps.push({ step, items: [], titleAt: item.titleAt, keyAt: keyField?.at ?? null })
  }

  /** A lesson without # is one part. */
  private partInHand(): Part {
    const last = this.body.parts[this.body.parts.length - 1]
    if (last) return last
    const key = this.keys.has('all') ? slugOf('all', this.keys) : 'all'
    const part: Part = { key, title: [], range: this.findings.range(0, 0), repeat: null, say: null, order: 'each', when: null, stop: null, text: [], steps: [] }
    this.body.parts.push(part)
    return part
  }

  private stepInHand(): Step | null {
    const part = this.body.parts[this.body.parts.length - 1]
    return part?.steps[part.steps.length - 1] ?? null
  }

  private block(item: Extract<Item, { t: 'block' }>): void {
    const step = this.stepInHand()
    if (step) this.body.sighted.steps[this.body.sighted.steps.length - 1]?.items.push(item)
    if (!step) {
      if (item.keyword === 'FAULT') { const holder = emptyStep('x', [], this.findings.range(0, 0)); readBlock(this.read, item, holder, this.faultKeys); this.body.faults.push(...holder.faults) }
      else this.findings.add('keyword-inside', item.at, `${item.keyword} belongs to a step: it stands below a line that begins with ##.`)
      return
    }
    readBlock(this.read, item, step, this.faultKeys)
  }

  private text(item: Extract<Item, { t: 'text' }>): void {
    const text = item.lines.map(line => line.text).join('\n')
    if (text.trim() === '') return
    const { blocks, pictures } = readText({ text, at: item.at }, this.findings)
    const step = this.stepInHand()
    if (step) {
      step.text.push(...blocks)
      for (const picture of pictures) step.pictures.push({ name: picture.name, alt: picture.alt, mirror: mirrors(picture.name, picture.how), range: this.placeOf(text, picture.name, item.at) })
      this.body.sighted.steps[this.body.sighted.steps.length - 1]?.items.push(item)
      return
    }
    const part = this.body.parts[this.body.parts.length - 1]
    if (part) part.text.push(...blocks)
    else this.body.opening.push(...blocks)
  }

  private placeOf(text: string, name: string, at: Place) {
    const found = text.indexOf(`(${name}`)
    return this.findings.range(found < 0 ? at.from : at.from + found, found < 0 ? at.to : at.from + found + name.length + 1)
  }
}

/** Photographs are usually fixed, drawings usually mirror. */
function mirrors(name: string, how: string): boolean {
  return how === 'mirror' || (how !== 'fixed' && name.endsWith('.svg'))
}

export const isPlain = (title: readonly Inline[]): boolean => title.every(part => part.t === 'text' || part.t === 'figure' || part.t === 'turning')
