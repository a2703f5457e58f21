import { z } from 'zod'
import { AsideSchema, SlotSchema, withAside, type Aside, type Slot } from '~/utils/author/keeping'

export interface DeviceTexts {
  /** Texts of this lesson that lie here unsent, of this person, from any page that was open. */
  read: () => Slot[]
  /** Keeps the text of this page; false where the device keeps nothing. */
  keep: (slot: Slot) => boolean
  /** The studio has the text of this page now. */
  clear: () => void
  /** Takes every lying text away, once it is taken up or set aside. */
  clearAll: () => void
  /** Texts set aside, newest first. */
  aside: Ref<Aside[]>
  setAside: (more: Aside[]) => void
  letGo: (one: Aside) => void
}

/**
 * The texts of a lesson on this device, each open page in a slot of its own, so that two pages never write over each other.
 * Only in the browser; where storage is refused, nothing is kept and `keep` says so.
 */
export function useDeviceTexts(person: string, lesson: string): DeviceTexts {
  const prefix = `thirdhand:draft:${person}:${lesson}:`
  const asideKey = `thirdhand:aside:${person}:${lesson}`
  const own = prefix + crypto.randomUUID()
  const aside = ref<Aside[]>(readAs(asideKey, z.array(AsideSchema)) ?? [])
  const keys = () => attempt(() => Object.keys(localStorage).filter(key => key.startsWith(prefix))) ?? []

  function setAside(more: Aside[]): void {
    aside.value = withAside(aside.value, more)
    write(asideKey, aside.value)
  }

  return {
    read: () => keys().flatMap(key => readAs(key, SlotSchema) ?? []),
    keep: slot => write(own, slot),
    clear: () => void attempt(() => localStorage.removeItem(own)),
    clearAll: () => keys().forEach(key => attempt(() => localStorage.removeItem(key))),
    aside,
    setAside,
    letGo(one) {
      aside.value = aside.value.filter(other => other.source !== one.source)
      write(asideKey, aside.value)
    },
  }
}

/** Storage throws where it is full, forbidden or private. */
function attempt<T>(act: () => T): T | null {
  try {
    return act()
  }
  catch {
    return null
  }
}

function write(key: string, value: unknown): boolean {
  return attempt(() => (localStorage.setItem(key, JSON.stringify(value)), true)) ?? false
}

function readAs<T>(key: string, schema: z.ZodType<T>): T | null {
  const read = attempt(() => schema.safeParse(JSON.parse(localStorage.getItem(key) ?? 'null')))
  return read?.success ? read.data : null
}
