import { mountSuspended } from '@nuxt/test-utils/runtime'
import { describe, expect, it } from 'vitest'
import { defineComponent, h, ref } from 'vue'
import type { Block, Drawing, Inline, Picture, Safety } from '#shared/lesson/schema'
import LessonDrawing from '~/components/lesson/LessonDrawing.vue'
import LessonPicture from '~/components/lesson/LessonPicture.vue'
import LessonSafety from '~/components/lesson/LessonSafety.vue'
import LessonText from '~/components/lesson/LessonText.vue'
import { type LessonShown, provideLessonShown } from '~/composables/useLessonShown'

const range = { from: 0, to: 0, line: 1 }
const base: LessonShown = {
  scope: { cut: { kind: 'length', value: 101.69 }, inside: { kind: 'length', value: 3 }, wire: { kind: 'length', value: 0.7 }, neck: { kind: 'length', value: 2.1 }, bead: { kind: 'length', value: 8 } },
  units: 'mm', left: false, mayMirror: true, pictureAt: name => `/pictures/${name}`,
}
/** Mounts something of a lesson inside what shows it. */
async function show(make: () => ReturnType<typeof h>, more: Partial<LessonShown> = {}) {
  const shown = ref({ ...base, ...more })
  const wrapper = await mountSuspended(defineComponent({ setup() { provideLessonShown(shown); return make } }))
  return { wrapper, shown }
}
const text = (v: string): Inline => ({ t: 'text', v })

describe('the text of a lesson', () => {
  it('shows figures in the person’s units, and follows them as they change', async () => {
    const line: Inline[] = [text('Cut '), { t: 'figure', name: 'cut' }, text(', mark '), { t: 'figure', name: 'neck', to: 0.5 }]
    const { wrapper, shown } = await show(() => h(LessonText, { line }))
    expect(wrapper.text()).toBe('Cut 102 mm, mark 2.0 mm')
    shown.value = { ...shown.value, units: 'in' }
    await wrapper.vm.$nextTick()
    expect(wrapper.text()).toContain('4 in')
  })
  it('turns by the hand, unless the object may not be the mirror image', async () => {
    const line: Inline[] = [{ t: 'turning', v: 'clockwise' }]
    expect((await show(() => h(LessonText, { line }))).wrapper.text()).toBe('clockwise')
    expect((await show(() => h(LessonText, { line }), { left: true })).wrapper.text()).toBe('anticlockwise')
    expect((await show(() => h(LessonText, { line }), { left: true, mayMirror: false })).wrapper.text()).toBe('clockwise')
  })
  it('shows marks of HTML as the letters they are', async () => {
    const blocks: Block[] = [{ t: 'p', c: [text('<img src=x onerror=alert(1)> a < b')] }]
    const { wrapper } = await show(() => h(LessonText, { blocks }))
    expect(wrapper.find('img').exists()).toBe(false)
    expect(wrapper.text()).toBe('<img src=x onerror=alert(1)> a < b')
  })
  it('goes only where a safe address leads', async () => {
    const line: Inline[] = [{ t: 'link', href: 'javascript:alert(1)', c: [text('no')] }, { t: 'link', href: 'https://studio.example/', c: [text('yes')] }]
    const { wrapper } = await show(() => h(LessonText, { line }))
    expect(wrapper.findAll('a').map(a => a.text())).toEqual(['yes'])
  })
  it('says of a figure without a value that it has none', async () => {
    expect((await show(() => h(LessonText, { line: [{ t: 'figure', name: 'gone' }] }))).wrapper.text()).toBe('gone?')
  })
})

describe('a picture', () => {
  const picture = (mirror: boolean): Picture => ({ name: 'cut.svg', alt: [text('Cut at '), { t: 'figure', name: 'cut' }], mirror, range })
  it('turns over for the left hand only where it may', async () => {
    const turned = async (mirror: boolean, left: boolean) => (await show(() => h(LessonPicture, { picture: picture(mirror) }), { left })).wrapper.get('img').classes().includes('lesson-picture-over')
    expect([await turned(true, true), await turned(true, false), await turned(false, true)]).toEqual([true, false, false])
  })
  it('says what it shows, and stands as words when it does not come', async () => {
    const { wrapper } = await show(() => h(LessonPicture, { picture: picture(false) }))
    expect(wrapper.get('img').attributes()).toMatchObject({ src: '/pictures/cut.svg', alt: 'Cut at 102 mm' })
    await wrapper.get('img').trigger('error')
    expect(wrapper.find('img').exists()).toBe(false)
    expect(wrapper.text()).toBe('Cut at 102 mm')
  })
})

describe('a safety note', () => {
  const safety = (word: Safety['word']): Safety => ({ word, hazard: [text('Cut wire flies')], avoid: [{ t: 'p', c: [text('Eyes covered.')] }], when: null, range })
  it('carries its word and shape, not colour alone', async () => {
    for (const word of ['DANGER', 'WARNING', 'CAUTION'] as const) {
      const { wrapper } = await show(() => h(LessonSafety, { safety: safety(word) }))
      expect([wrapper.get('.safety-word').text(), wrapper.get('.safety-text').text()]).toEqual([word, 'Cut wire flies. Eyes covered.'])
      expect(wrapper.find('svg').exists()).toBe(true)
    }
    const { wrapper } = await show(() => h(LessonSafety, { safety: safety('NOTICE') }))
    expect(wrapper.find('svg').exists()).toBe(false)
  })
})

describe('a drawing', () => {
  const name = (n: string) => [{ k: 'name' as const, n }]
  const loop: Drawing = { kind: 'loop', args: { inside: name('inside'), wire: name('wire'), neck: name('neck'), bead: name('bead') }, when: null, range }
  it('puts the figures on it', async () => {
    const { wrapper } = await show(() => h(LessonDrawing, { drawing: loop }))
    expect(wrapper.get('svg').attributes('aria-label')).toBe('Drawing: loop. 3 mm, neck 2.1 mm.')
  })
  it('is not there where a figure is missing', async () => {
    const { wrapper } = await show(() => h(LessonDrawing, { drawing: { ...loop, args: { ...loop.args, neck: name('gone') } } }))
    expect(wrapper.find('svg').exists()).toBe(false)
  })
})
