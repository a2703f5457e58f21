import type { JudgementBody } from '#shared/schemas/judging'

export interface JudgeAction {
  /** Sends the judgement. True when it was taken; else `says` holds the sentence, and what was typed stays. */
  judge: (body: JudgementBody) => Promise<boolean>
  isBusy: Ref<boolean>
  says: Ref<string>
  /** More came in than the page shows. */
  isStale: Ref<boolean>
}

/** Sends one judgement. A double press is the same one, by its id. */
export function useJudgeAction(): JudgeAction {
  const isBusy = ref(false)
  const says = ref('')
  const isStale = ref(false)
  async function judge(body: JudgementBody): Promise<boolean> {
    if (isBusy.value) return false
    isBusy.value = true
    says.value = ''
    try {
      await $fetch('/api/judgements', { method: 'POST', body })
      return true
    }
    catch (error) {
      const refusal = refusalOf(error)
      says.value = refusal.says
      isStale.value = refusal.statusCode === 409
      return false
    }
    finally {
      isBusy.value = false
    }
  }
  return { judge, isBusy, says, isStale }
}
