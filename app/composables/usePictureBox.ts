import type { DraftPicture } from '#shared/types/lessons'
import { MOST_PICTURE_BYTES } from '#shared/schemas/lessons'
import { pictureName } from '~/utils/author/picture-name'
import { sayTrouble } from '~/utils/author/trouble'

export interface PictureBox {
  /** Takes files in, one after the other. */
  add: (files: File[]) => Promise<void>
  takeAway: (name: string) => Promise<void>
  /** What went wrong, a sentence for each file. */
  says: Ref<string[]>
  isBusy: Ref<boolean>
}

/** Puts pictures beside a lesson and takes them away. */
export function usePictureBox(lessonId: MaybeRefOrGetter<string>, pictures: Ref<DraftPicture[]>): PictureBox {
  const says = ref<string[]>([])
  const isBusy = ref(false)
  const address = () => `/api/lessons/${toValue(lessonId)}/pictures`

  const sentence = (error: unknown): string => sayTrouble(error, 'Choose it again when it is back.')

  async function addOne(file: File): Promise<void> {
    const name = pictureName(file.name)
    if (file.size > MOST_PICTURE_BYTES) {
      says.value.push(`${file.name}: this picture is larger than 32 MB. Make it smaller.`)
      return
    }
    try {
      const kept = await $fetch<DraftPicture>(address(), { method: 'POST', query: { name }, body: file, headers: { 'content-type': 'application/octet-stream' } })
      pictures.value = [...pictures.value.filter(picture => picture.name !== name), kept].sort((a, b) => (a.name < b.name ? -1 : 1))
    }
    catch (error) {
      says.value.push(`${file.name}: ${sentence(error)}`)
    }
  }

  async function add(files: File[]): Promise<void> {
    says.value = []
    isBusy.value = true
    for (const file of files) await addOne(file)
    isBusy.value = false
  }

  async function takeAway(name: string): Promise<void> {
    says.value = []
    try {
      await $fetch(`${address()}/${name}`, { method: 'DELETE' })
      pictures.value = pictures.value.filter(picture => picture.name !== name)
    }
    catch (error) {
      says.value.push(`${name}: ${sentence(error)}`)
    }
  }

  return { add, takeAway, says, isBusy }
}
