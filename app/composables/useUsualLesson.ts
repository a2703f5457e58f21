import type { Lesson } from '#shared/lesson/schema'
import { usualScope } from '#shared/lesson/usual'
import type { LessonShown } from './useLessonShown'

/** Shows a lesson at its usual sizes, right-handed, to the components below. `pictureAt` says where its pictures are. */
export function useUsualLesson(lesson: MaybeRefOrGetter<Lesson | null>, pictureAt: (name: string) => string): Ref<LessonShown> {
  const shown = computed<LessonShown>(() => {
    const value = toValue(lesson)
    return { scope: value ? usualScope(value) : {}, units: 'mm', left: false, mayMirror: value?.objectMayMirror ?? false, pictureAt }
  })
  provideLessonShown(shown)
  return shown
}
