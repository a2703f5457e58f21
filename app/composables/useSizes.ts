import { onceFrom } from '#shared/bench/once'
import { type Begun, beginWith, outsideSays, sizesAgain, stepSize, type ToldSizes, toldOf, typeSize, worked } from '#shared/bench/sizes'
import { covered } from '#shared/bench/scope'
import { sizesScope } from '#shared/lesson/figures'
import type { Size } from '#shared/lesson/schema'
import type { LengthUnits } from '#shared/lesson/shown'
import type { Scope } from '#shared/lesson/values'
import type { BenchLesson } from '#shared/types/bench'

export interface SizesBefore {
  told: Ref<ToldSizes>
  /** What is wrong with what was typed, by size. */
  faults: Ref<Record<string, string>>
  outside: ComputedRef<string[]>
  /** The person says this is for wearing, and the sizes allow it. */
  practice: Ref<boolean>
  mustPractise: ComputedRef<boolean>
  scope: ComputedRef<Scope>
  without: ComputedRef<Record<string, string>>
  begun: ComputedRef<Begun>
  step: (size: Size, way: 1 | -1) => void
  type: (size: Size, text: string) => void
}

/** The sizes of a piece that is about to begin, and all that follows from them. */
export function useSizes(lesson: BenchLesson, units: Ref<LengthUnits>, left: Ref<boolean>): SizesBefore {
  const { compiled } = lesson
  const told = ref<ToldSizes>(sizesAgain(compiled, lesson.last, units.value))
  const faults = ref<Record<string, string>>({})
  const practice = ref(false)
  const outside = computed(() => compiled.sizes.flatMap((size) => { const one = told.value[size.name]; return one ? outsideSays(size, one, units.value) ?? [] : [] }))
  const mustPractise = computed(() => compiled.sizes.some((size) => { const one = told.value[size.name]; return one !== undefined && !covered(size, one) }))
  const figures = computed(() => worked(compiled, told.value))
  const scope = computed<Scope>(() => ({ ...sizesScope(compiled, Object.fromEntries(compiled.sizes.map(size => [size.name, baseValue(size, told.value)]))), ...figures.value.figures }))
  const begun = computed(() => beginWith({
    lesson: compiled, ids: { lesson: lesson.lesson.id, revision: lesson.revision.id, compiled: lesson.revision.compiledSha }, sizes: told.value, practice: practice.value, left: left.value,
    level: lesson.level, once: onceFrom(compiled, told.value, lesson.earlier.map(state => ({ state })), new Date().toISOString().slice(0, 10)),
  }))

  const clear = (name: string): void => { faults.value = Object.fromEntries(Object.entries(faults.value).filter(([key]) => key !== name)) }
  function step(size: Size, way: 1 | -1): void {
    clear(size.name)
    told.value = { ...told.value, [size.name]: stepSize(size, told.value[size.name] ?? toldOf(size, size.usual, units.value), way, units.value) }
  }
  function type(size: Size, text: string): void {
    const read = typeSize(size, text, units.value)
    if (!read.ok) { faults.value = { ...faults.value, [size.name]: read.says }; return }
    clear(size.name)
    told.value = { ...told.value, [size.name]: read.told }
  }
  return { told, faults, outside, practice, mustPractise, scope, without: computed(() => figures.value.without), begun, step, type }
}

/** A told size as the evaluator takes it. */
function baseValue(size: Size, told: ToldSizes) {
  const text = told[size.name]?.value ?? ''
  if (size.unit === 'choice' || size.unit === 'metal') return text
  return size.unit === 'yes_no' ? text === 'yes' : Number(text)
}
