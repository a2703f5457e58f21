import type { Finding } from '#shared/lesson/schema'

export interface FindingWalk {
  /** In the order of the text; advice left out when it is put aside. */
  shown: ComputedRef<Finding[]>
  errors: ComputedRef<number>
  advice: ComputedRef<number>
  /** Is advice shown? */
  withAdvice: Ref<boolean>
  /** The next finding after a place of the text, or the one before it; round the end. */
  next: (at: number, back: boolean) => Finding | null
  /** The finding at a place that one key mends: one the place lies in, else the first of its line. */
  mendable: (at: number, line: number) => Finding | null
}

/** Goes along what the compiler has to say. */
export function useFindings(findings: MaybeRefOrGetter<readonly Finding[]>): FindingWalk {
  const withAdvice = ref(true)
  const all = computed(() => [...toValue(findings)].sort((a, b) => a.from - b.from || a.to - b.to))
  const count = (severity: Finding['severity']) => computed(() => all.value.filter(finding => finding.severity === severity).length)
  const shown = computed(() => all.value.filter(finding => finding.severity === 'error' || withAdvice.value))

  function next(at: number, back: boolean): Finding | null {
    const list = shown.value
    const beyond = back ? list.filter(finding => finding.from < at).at(-1) : list.find(finding => finding.from > at)
    return beyond ?? list.at(back ? -1 : 0) ?? null
  }

  function mendable(at: number, line: number): Finding | null {
    const list = shown.value.filter(finding => finding.mend)
    return list.find(finding => finding.from <= at && at <= finding.to) ?? list.find(finding => finding.line === line) ?? null
  }

  return { shown, errors: count('error'), advice: count('advice'), withAdvice, next, mendable }
}
