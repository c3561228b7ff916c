import { useQuery } from '@tanstack/vue-query'
import { computed, toValue, type MaybeRefOrGetter } from 'vue'
import { readHistory, readRevision } from '@/api/revisions'
import { asking } from './asking'

/** One revision: its title block, its people, and how its sheet is opened. Waits until an id is given. */
export const useRevision = (id: MaybeRefOrGetter<string | undefined>) => {
  const query = useQuery({
    queryKey: computed(() => ['revision', toValue(id)]),
    queryFn: ({ signal }) => readRevision(toValue(id) ?? '', signal),
    enabled: computed(() => Boolean(toValue(id))),
  })
  return { revision: computed(() => query.data.value), ...asking(query) }
}

/** Who wrote what in a revision, latest first; of one line, heading or front text where `subject` names it. */
export const useHistory = (
  id: MaybeRefOrGetter<string | undefined>,
  subject: MaybeRefOrGetter<string | undefined>,
) => {
  const query = useQuery({
    queryKey: computed(() => ['history', toValue(id), toValue(subject)]),
    queryFn: ({ signal }) => readHistory(toValue(id) ?? '', toValue(subject), signal),
    enabled: computed(() => Boolean(toValue(id))),
    staleTime: 0,
  })
  return { history: computed(() => query.data.value), ...asking(query) }
}
