/** An answer of 401 anywhere but at the door: the evening has ended here, and the page says how to come in again (SayWho). */
export default defineNuxtPlugin(() => {
  const isOut = useSayWho()
  const route = useRouter().currentRoute
  globalThis.$fetch = $fetch.create({
    onResponse({ response }) {
      if (response.status === 401 && !route.value.path.startsWith('/come-in')) isOut.value = true
    },
  }) as typeof globalThis.$fetch
})
