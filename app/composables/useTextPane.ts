import { indent, lineAt, newLine, outdent, type TextEdit } from '~/utils/author/text'

export interface TextPane {
  /** Where the caret stands, and its line, from 1. */
  caret: Ref<number>
  line: ComputedRef<number>
  /** Chooses a piece of the text and brings it into sight. */
  select: (from: number, to: number) => void
  /** Makes an edit that the browser's own undo takes back. */
  edit: (change: TextEdit) => void
  /** Enter, and the keys of indenting; the Tab key stays what moves from place to place. */
  onKey: (event: KeyboardEvent) => void
}

/** Types as a person would: the one way to change a textarea that keeps its undo. False where an engine has it no more. */
function typeIn(text: string, isNothingChosen: boolean): boolean {
  if (typeof document.execCommand !== 'function') return false
  if (text === '') return isNothingChosen || document.execCommand('delete')
  return document.execCommand('insertText', false, text)
}

/** A textarea that can be edited by keys and by mends, and says where its caret is. */
export function useTextPane(area: Readonly<Ref<HTMLTextAreaElement | null>>, source: Ref<string>): TextPane {
  const caret = ref(0)
  const line = computed(() => lineAt(source.value, caret.value))
  useEventListener(document, 'selectionchange', () => {
    if (area.value && document.activeElement === area.value) caret.value = area.value.selectionStart
  })

  function select(from: number, to: number): void {
    const box = area.value
    if (!box) return
    box.focus({ preventScroll: true })
    box.setSelectionRange(from, to)
    caret.value = from
  }

  function edit({ from, to, text, select: [start, end] }: TextEdit): void {
    const box = area.value
    if (!box) return
    box.focus({ preventScroll: true })
    box.setSelectionRange(from, to)
    if (!typeIn(text, from === to)) {
      box.setRangeText(text, from, to)
      box.dispatchEvent(new Event('input', { bubbles: true }))
    }
    box.setSelectionRange(start, end)
    caret.value = start
  }

  function changeFor(event: KeyboardEvent, box: HTMLTextAreaElement): TextEdit | null {
    const { value, selectionStart: from, selectionEnd: to } = box
    if (event.key === 'Enter' && !event.ctrlKey && !event.metaKey && !event.altKey && !event.shiftKey) return newLine(value, from, to)
    const isIndenting = (event.ctrlKey || event.metaKey) && !event.altKey
    if (isIndenting && event.key === ']') return indent(value, from, to)
    return isIndenting && event.key === '[' ? outdent(value, from, to) : null
  }

  function onKey(event: KeyboardEvent): void {
    if (!area.value || event.isComposing) return
    const change = changeFor(event, area.value)
    const isIndentKey = (event.ctrlKey || event.metaKey) && !event.altKey && (event.key === ']' || event.key === '[')
    if (change || isIndentKey) event.preventDefault()
    if (change) edit(change)
  }

  return { caret, line, select, edit, onKey }
}
