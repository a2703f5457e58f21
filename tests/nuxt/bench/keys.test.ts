import { mountSuspended } from '@nuxt/test-utils/runtime'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { defineComponent, h, ref, type VNode } from 'vue'
import { KEPT_FROM_MS, REST_MS } from '#shared/bench/keys'
import type { Choice, Hold } from '#shared/lesson/schema'
import BenchHold from '~/components/bench/BenchHold.vue'
import BenchSay from '~/components/bench/BenchSay.vue'
import { provideBenchKeys } from '~/composables/useBenchKeys'
import { provideLessonShown } from '~/composables/useLessonShown'

const range = { from: 0, to: 0, line: 1 }
const says = (v: string) => [{ t: 'text' as const, v }]
const choices: Choice[] = [{ key: 'nothing', says: says('Nothing'), right: false, fault: says('It can never join.'), range }, { key: 'link', says: says('The link before'), right: true, fault: null, range }]
const hold = (ask: Hold['asks'][number]): Hold => ({ consequence: says('It is closed'), text: [], asks: [ask], wrong: says('Count again.'), witness: null, once: 'piece', when: null, range })
const asked: Hold['asks'][number] = { kind: 'choices', question: [{ t: 'p', c: says('What hangs in it?') }], choices, fixed: true }

let done: string[] = []
let clock = 0
const mounted: { unmount: () => void }[] = []
beforeEach(() => { done = []; clock = 10_000 })
afterEach(() => mounted.splice(0).forEach(one => one.unmount()))

/** A key as the browser tells of it, with its own clock. */
function fire(type: 'keydown' | 'keyup', code: string, at: number, target: EventTarget = document.body, repeat = false): void {
  const event = new KeyboardEvent(type, { code, key: code, bubbles: true, cancelable: true, repeat })
  Object.defineProperty(event, 'timeStamp', { value: at })
  target.dispatchEvent(event)
}
async function press(code: string, kept = 60, target?: EventTarget): Promise<void> {
  clock += REST_MS + 100
  fire('keydown', code, clock, target)
  clock += kept
  fire('keyup', code, clock, target)
  await new Promise(resolve => requestAnimationFrame(resolve))
}
async function mount(make: () => VNode | VNode[]) {
  const one = await mountSuspended(defineComponent({ setup() {
    provideLessonShown(ref({ scope: {}, units: 'mm', left: false, mayMirror: true, pictureAt: () => '' }))
    provideBenchKeys({ next: () => done.push('next'), back: () => done.push('back'), help: () => done.push('help') }, 'step')
    return () => h('div', make())
  } }), { attachTo: document.body })
  mounted.push(one)
  return one
}
const holdOf = (ask: Hold['asks'][number]) => [h(BenchHold, { id: 'a', hold: hold(ask), ask, choices: ask.kind === 'choices' ? choices : [], reading: null, more: [], onAnswer: answer => done.push(JSON.stringify(answer)) }), h(BenchSay)]

describe('keys on a step', () => {
  it('go on, back and to help, and not while something is typed', async () => {
    const one = await mount(() => [h('input', { 'aria-label': 'a box' })])
    await press('PageDown')
    await press('ArrowLeft')
    await press('KeyH')
    expect(done).toEqual(['next', 'back', 'help'])
    await press('PageDown', 60, one.get('input').element)
    await press('KeyH', 60, one.get('input').element)
    expect(done).toHaveLength(3)
  })
})

describe('keys at a hold with choices', () => {
  it('walk, light the one walked to, and say it when kept down', async () => {
    const one = await mount(() => holdOf(asked))
    for (let i = 0; i < 9; i++) await press('PageDown')
    expect(done).toEqual([])
    expect(one.findAll('[aria-pressed="true"]').map(button => button.text())).toEqual(['Nothing'])
    expect(document.activeElement?.textContent).toBe('Nothing')
    await press('ArrowDown')
    await press('PageDown', KEPT_FROM_MS + 100)
    expect(done).toEqual(['{"choice":"link"}'])
  })
  it('say nothing while nothing is lit, however long a key is kept down, and never by the long press of a held key', async () => {
    await mount(() => holdOf(asked))
    await press('PageDown', KEPT_FROM_MS + 100)
    await press('Enter')
    expect(done).toEqual([])
    await press('PageDown')
    await press('PageDown', 5000)
    expect(done).toEqual([])
  })
  it('say the lit one by Enter on it', async () => {
    await mount(() => holdOf(asked))
    await press('PageDown')
    await press('Enter', 40, document.activeElement ?? document.body)
    expect(done).toEqual(['{"choice":"nothing"}'])
  })
})

describe('taps at a hold with choices', () => {
  it('light a choice and say it apart from it; taps where Next was say nothing', async () => {
    const one = await mount(() => holdOf(asked))
    const say = () => one.get('.bench-saying')
    for (let i = 0; i < 5; i++) await say().trigger('click')
    expect(done).toEqual([])
    expect(say().attributes('aria-disabled')).toBe('true')
    const link = one.findAll('button').find(button => button.text() === 'The link before')
    await link?.trigger('click')
    await link?.trigger('click')
    expect(done).toEqual([])
    expect(say().text()).toContain('The link before')
    await say().trigger('click')
    expect(done).toEqual(['{"choice":"link"}'])
  })
})

describe('a count', () => {
  const count: Hold['asks'][number] = { kind: 'count', is: { k: 'num', v: 11 }, question: says('How many?') }
  const type = async (digits: string) => {
    for (const digit of digits) {
      const event = new KeyboardEvent('keydown', { key: digit, code: `Digit${digit}`, bubbles: true, cancelable: true })
      document.body.dispatchEvent(event)
    }
    await new Promise(resolve => requestAnimationFrame(resolve))
  }
  it('is empty until it is typed, is shown large before it counts, and goes by Enter', async () => {
    const one = await mount(() => holdOf(count))
    expect(one.get('.measure-number').text()).toBe('–')
    await press('Enter')
    expect(done).toEqual([])
    await type('11')
    expect(one.get('.measure-number').text()).toBe('11')
    expect(one.get('.bench-saying').text()).toContain('It is 11')
    await press('Enter')
    expect(done).toEqual(['{"count":"11","typed":"11"}'])
  })
  it('is typed by tapping the keys, and by walking to them with a pedal', async () => {
    const one = await mount(() => holdOf(count))
    const key = (name: string) => one.findAll('.keypad button').find(button => button.text() === name)
    await key('1')?.trigger('click')
    await key('2')?.trigger('click')
    await key('←')?.trigger('click')
    expect(one.get('.measure-number').text()).toBe('1')
    await press('PageDown')
    await press('PageDown', KEPT_FROM_MS + 50)
    expect(one.get('.measure-number').text()).toBe('11')
    expect(done).toEqual([])
  })
})
