import { ulid } from 'ulid'
import { levelWords } from '#shared/judging/levels'
import type { SignResult, ToSign } from '#shared/types/judging'

export interface Signing {
  /** Signs each by itself. True when at least one was signed. */
  sign: (password: string, items: readonly ToSign[], words: Record<string, string>) => Promise<boolean>
  /** What became of each, by its judgement; what was signed is said on although it waits no longer. */
  results: Ref<Record<string, { ok: boolean, label: string, says: string }>>
  says: Ref<string>
  isBusy: Ref<boolean>
}

/** Signs gathered judgements with one password. Each keeps its own id, so that a double press signs nothing twice. */
export function useSigning(): Signing {
  const ids = new Map<string, string>()
  const results = ref<Record<string, { ok: boolean, label: string, says: string }>>({})
  const says = ref('')
  const isBusy = ref(false)
  const idOf = (judgement: string): string => {
    const id = ids.get(judgement) ?? ulid()
    ids.set(judgement, id)
    return id
  }
  const resultWords = (result: SignResult): string => {
    if (!result.ok) return result.says
    return result.needsSecondName ? `Signed: ${levelWords(result.level)}. It stands on one signature until a second name.` : `Signed: ${levelWords(result.level)}.`
  }
  async function sign(password: string, items: readonly ToSign[], words: Record<string, string>): Promise<boolean> {
    if (isBusy.value) return false
    isBusy.value = true
    says.value = ''
    try {
      const body = { password, items: items.map(({ judgement, judgements, level, n, head }) => ({ id: idOf(judgement), judgements, level, n, head, words: words[judgement] ?? '' })) }
      const answer = await $fetch('/api/sign-offs', { method: 'POST', body })
      for (const result of answer.results) {
        const item = items.find(one => idOf(one.judgement) === result.id)
        if (item) results.value[item.judgement] = { ok: result.ok, label: `${item.label}, ${item.maker}`, says: resultWords(result) }
      }
      return answer.results.some(result => result.ok)
    }
    catch (error) {
      says.value = refusalOf(error).says
      return false
    }
    finally {
      isBusy.value = false
    }
  }
  return { sign, results, says, isBusy }
}
