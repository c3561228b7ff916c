import type { ChangePerson } from '@shared/api/people'
import { useMutation, useQuery, useQueryClient } from '@tanstack/vue-query'
import { computed } from 'vue'
import { addPerson, changePerson, listPeople, renewLink } from '@/api/people'
import { useSessionStore } from '@/stores/session'
import { acting, asking } from './asking'

/** The people of the firm. */
export const usePeople = () => {
  const session = useSessionStore()
  const query = useQuery({
    queryKey: ['people'],
    queryFn: ({ signal }) => listPeople(signal),
    enabled: computed(() => session.allows('see-people').allowed),
  })
  return {
    people: computed(() => query.data.value?.people ?? []),
    ...asking(query, session.allows('see-people')),
  }
}

/** What an administrator does with them. */
export const usePeopleAdministration = () => {
  const client = useQueryClient()
  const onSuccess = () => client.invalidateQueries({ queryKey: ['people'] })
  const adding = useMutation({ mutationFn: addPerson, onSuccess })
  const changing = useMutation({
    mutationFn: ({ id, ...change }: ChangePerson & { id: string }) => changePerson(id, change),
    onSuccess,
  })
  const renewing = useMutation({ mutationFn: renewLink, onSuccess })
  return {
    adding: { add: adding.mutateAsync, ...acting(adding) },
    changing: { change: changing.mutateAsync, ...acting(changing) },
    renewing: { renew: renewing.mutateAsync, ...acting(renewing) },
  }
}
