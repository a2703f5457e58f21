export interface TypedLabel {
  /** What was typed so far, in capitals. */
  typed: Ref<string>
  /** Something begins with it. */
  isFound: Ref<boolean>
}

/** Letters, digits and hyphens typed anywhere on a page go to the first element whose `data-label` begins with them. */
export function useTypedLabel(): TypedLabel {
  const typed = ref('')
  const isFound = ref(true)
  useEventListener('keydown', (event: KeyboardEvent) => {
    const { key, target } = event
    if (event.altKey || event.ctrlKey || event.metaKey) return
    if (target instanceof HTMLElement && target.matches('input, textarea, select')) return
    if (key === 'Escape') typed.value = ''
    else if (key === 'Backspace') typed.value = typed.value.slice(0, -1)
    else if (/^[a-z0-9-]$/i.test(key)) typed.value += key.toUpperCase()
    else return
    const match = typed.value === '' ? null : [...document.querySelectorAll<HTMLElement>('[data-label]')].find(one => one.dataset.label?.startsWith(typed.value))
    isFound.value = typed.value === '' || Boolean(match)
    match?.focus()
    event.preventDefault()
  })
  return { typed, isFound }
}
