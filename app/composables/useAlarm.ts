/** Seconds of one tone and of the rest after it; hertz of two tones in turn. */
const TONE = 0.35
const PITCHES = [880, 660] as const

/** Sounds while the component is there: two tones in turn, made here, so that it works with nothing in reach. */
export function useAlarm(): void {
  let context: AudioContext | null = null
  let count = 0

  function tone(): void {
    if (!context || context.state === 'closed') return
    const oscillator = context.createOscillator()
    const gain = context.createGain()
    oscillator.type = 'square'
    oscillator.frequency.value = PITCHES[count++ % 2] ?? PITCHES[0]
    gain.gain.value = 0.25
    oscillator.connect(gain).connect(context.destination)
    oscillator.start()
    oscillator.stop(context.currentTime + TONE)
  }

  onMounted(() => {
    if (!('AudioContext' in window)) return
    context = new AudioContext()
    tone()
  })
  useIntervalFn(tone, TONE * 2000)
  onScopeDispose(() => void context?.close())
}
