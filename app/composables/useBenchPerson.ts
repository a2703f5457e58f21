import { z } from 'zod'
import { GROUNDS, HANDS } from '#shared/schemas/lists'
import { LENGTH_UNITS } from '#shared/lesson/shown'

const PersonSchema = z.object({ id: z.string(), name: z.string(), hand: z.enum(HANDS), textSize: z.number(), ground: z.enum(GROUNDS) })
export type BenchPerson = z.infer<typeof PersonSchema>
const MeSchema = z.object({ person: PersonSchema, may: z.array(z.string()) })
const ChoicesSchema = z.object({ units: z.enum(LENGTH_UNITS).catch('mm'), bench: z.string().catch('') }).catch({ units: 'mm', bench: '' })

/** Who is at this bench. Where the studio cannot be reached, whoever it was last: the bench comes first. */
export function useBenchPerson() {
  const person = useState<BenchPerson | null>('bench-person', () => null)
  const kept = useLocalStorage<BenchPerson | null>('thirdhand-bench-person', null, { serializer: jsonOf(PersonSchema.nullable().catch(null)) })
  /** May they look at a hold? */
  const mayLook = useState('bench-may-look', () => false)
  const outbox = useOutboxStore()
  const ground = useState<string>('ground', () => 'paper')
  useHead({ htmlAttrs: { style: () => `font-size: ${(person.value?.textSize ?? 100) * 0.16}px` } })

  /** `who`: they must say who they are. */
  async function ready(): Promise<'ready' | 'who' | 'away'> {
    if (!person.value) {
      const answer = await $fetch.raw<unknown>('/api/me', { ignoreResponseError: true, retry: 0 }).catch(() => null)
      const me = MeSchema.safeParse(answer?._data)
      if (answer?.status === 401) { kept.value = null; return 'who' }
      person.value = me.success ? me.data.person : kept.value
      if (me.success) { kept.value = me.data.person; mayLook.value = me.data.may.includes('witness') }
    }
    if (!person.value) return 'away'
    ground.value = person.value.ground
    await outbox.start(person.value.id)
    return 'ready'
  }
  /** The person has finished here: this tablet forgets who it was, and keeps the pieces for when they come back. */
  async function leave(): Promise<void> {
    await $fetch('/api/finished', { method: 'POST' }).catch(() => undefined)
    kept.value = null
    person.value = null
    clearNuxtData('me')
    await navigateTo('/come-in')
  }
  return { person, mayLook, ready, leave }
}

/** What is chosen for this tablet: units, and the name of the bench it stands at. */
export const useTabletChoices = () => useLocalStorage('thirdhand-tablet', { units: 'mm' as const, bench: '' }, { serializer: jsonOf(ChoicesSchema) })

function jsonOf<T>(schema: z.ZodType<T>) {
  const parse = (text: string): unknown => { try { return JSON.parse(text) } catch { return null } }
  return { read: (text: string): T => schema.parse(parse(text)), write: (value: T): string => JSON.stringify(value) }
}
