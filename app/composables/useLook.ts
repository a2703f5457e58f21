import type { LookLine } from '#shared/types/bench'

export interface Look {
  asked: ComputedRef<boolean>
  /** How many were asked for before it; null while that is not known. */
  before: Ref<number | null>
  ask: (about: 'stuck' | 'check' | 'hold') => Promise<void>
  letGo: () => Promise<void>
}

/** A look asked for on the piece in hand, and its place in the line. */
export function useLook(turn: Ref<string | null>): Look {
  const bench = useBenchStore()
  const outbox = useOutboxStore()
  const asked = computed(() => Boolean(bench.folded?.state.look))
  const before = ref<number | null>(null)

  async function hear(): Promise<void> {
    if (!asked.value || !bench.piece || outbox.waiting > 0) { before.value = null; return }
    const line = await $fetch<LookLine>(`/api/bench/line/${bench.piece.id}`).catch(() => null)
    before.value = line?.asked ? line.before : null
  }
  useIntervalFn(() => void hear(), 6000)
  watch([asked, () => outbox.waiting], () => void hear(), { immediate: true })

  return {
    asked, before,
    ask: async about => void await bench.act('look.asked', { turn: turn.value, about }),
    letGo: async () => void await bench.act('look.let-go', { turn: turn.value }),
  }
}
