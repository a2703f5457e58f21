import { promiseTimeout } from '@vueuse/core'
import { type Made, photoFrom } from '~/utils/bench/photo'

export interface Camera {
  /** Shows what the camera sees. */
  video: Ref<HTMLVideoElement | null>
  state: Ref<'closed' | 'open' | 'none'>
  /** Seconds left of the count, 0 while none runs. */
  left: Ref<number>
  /** Counts three seconds, then takes the photo. */
  take: () => Promise<Made | null>
}

const COUNT = 3

/** The camera of the tablet while the component is there. `none` where there is none or it may not be used: a file does. */
export function useCamera(): Camera {
  const video = ref<HTMLVideoElement | null>(null)
  const state = ref<'closed' | 'open' | 'none'>('closed')
  const left = ref(0)
  let stream: MediaStream | null = null
  let isGone = false

  onMounted(async () => {
    stream = await navigator.mediaDevices?.getUserMedia({ video: { width: { ideal: 1600 }, height: { ideal: 1200 } }, audio: false }).catch(() => null) ?? null
    if (isGone || !stream || !video.value) {
      stream?.getTracks().forEach(track => track.stop())
      state.value = 'none'
      return
    }
    video.value.srcObject = stream
    await video.value.play().catch(() => undefined)
    state.value = 'open'
  })
  onScopeDispose(() => {
    isGone = true
    stream?.getTracks().forEach(track => track.stop())
  })

  async function take(): Promise<Made | null> {
    if (state.value !== 'open' || left.value > 0) return null
    for (left.value = COUNT; left.value > 0; left.value--) await promiseTimeout(1000)
    const seen = video.value
    return seen && !isGone ? await photoFrom(seen, seen.videoWidth, seen.videoHeight) : null
  }
  return { video, state, left, take }
}
