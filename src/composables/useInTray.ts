import { useQuery } from '@tanstack/vue-query'
import { computed } from 'vue'
import { readInTray } from '@/api/inTray'
import { asking } from './asking'

/** What waits for the signed-in person, what that person waits for, and what changed. */
export const useInTray = () => {
  const query = useQuery({ queryKey: ['in-tray'], queryFn: ({ signal }) => readInTray(signal) })
  return { inTray: computed(() => query.data.value), ...asking(query) }
}
