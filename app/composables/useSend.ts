import type { Ref } from 'vue'

export interface Send {
  /** Sends it; the answer, or null where it was refused. A second press while it is under way does nothing. */
  send: <T>(path: string, body?: Record<string, unknown>, method?: 'POST' | 'PATCH' | 'DELETE') => Promise<T | null>
  isBusy: Ref<boolean>
  /** The sentence of a refusal, or nothing. */
  says: Ref<string>
  /** Sentences at fields. */
  faults: Ref<Record<string, string[]>>
  /** 401, 429 ...; 0 where the studio could not be reached or nothing was refused. */
  status: Ref<number>
}

/** One form's way to the server: what was typed stays in the form whatever the answer is. */
export function useSend(): Send {
  const [isBusy, says, faults, status] = [ref(false), ref(''), ref<Record<string, string[]>>({}), ref(0)]
  return {
    isBusy, says, faults, status,
    async send<T>(path: string, body?: Record<string, unknown>, method: 'POST' | 'PATCH' | 'DELETE' = 'POST'): Promise<T | null> {
      if (isBusy.value) return null
      isBusy.value = true
      says.value = ''
      faults.value = {}
      status.value = 0
      try {
        return await $fetch<T, string>(path, { method, ...body ? { body } : {} })
      }
      catch (error) {
        const refusal = refusalOf(error)
        says.value = refusal.says
        faults.value = refusal.fieldErrors
        status.value = refusal.statusCode
        return null
      }
      finally {
        isBusy.value = false
      }
    },
  }
}
