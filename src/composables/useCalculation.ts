import type { ChangeTitleBlock } from '@shared/api/calculations'
import { useMutation, useQuery, useQueryClient } from '@tanstack/vue-query'
import { computed, toValue, type MaybeRefOrGetter } from 'vue'
import { changeTitleBlock, readCalculation } from '@/api/calculations'
import { acting, asking } from './asking'

/** One calculation with its revisions and people, and changing its title block. */
export const useCalculation = (id: MaybeRefOrGetter<string>) => {
  const query = useQuery({
    queryKey: computed(() => ['calculation', toValue(id)]),
    queryFn: ({ signal }) => readCalculation(toValue(id), signal),
  })
  return { calculation: computed(() => query.data.value), ...asking(query) }
}

export const useTitleBlockChange = (id: MaybeRefOrGetter<string>) => {
  const client = useQueryClient()
  const mutation = useMutation({
    mutationFn: (body: ChangeTitleBlock) => changeTitleBlock(toValue(id), body),
    onSuccess: (answer) => {
      client.setQueryData(['calculation', toValue(id)], answer)
      return Promise.all(
        ['calculations', 'revision', 'in-tray'].map((key) => client.invalidateQueries({ queryKey: [key] })),
      )
    },
  })
  return { change: mutation.mutateAsync, ...acting(mutation) }
}
