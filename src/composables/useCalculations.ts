import type { CalculationFilter } from '@shared/api/calculations'
import { keepPreviousData, useMutation, useQuery, useQueryClient } from '@tanstack/vue-query'
import { computed, toValue, type MaybeRefOrGetter } from 'vue'
import { createCalculation, listCalculations } from '@/api/calculations'
import { acting, asking } from './asking'

/** The firm's calculations that pass a filter, and beginning a new one. */
export const useCalculations = (filter: MaybeRefOrGetter<CalculationFilter>) => {
  const query = useQuery({
    queryKey: computed(() => ['calculations', toValue(filter)]),
    queryFn: ({ signal }) => listCalculations(toValue(filter), signal),
    placeholderData: keepPreviousData,
  })
  return { calculations: computed(() => query.data.value?.calculations ?? []), ...asking(query) }
}

export const useNewCalculation = () => {
  const client = useQueryClient()
  const mutation = useMutation({
    mutationFn: createCalculation,
    onSuccess: () =>
      Promise.all(
        ['calculations', 'in-tray', 'projects'].map((key) => client.invalidateQueries({ queryKey: [key] })),
      ),
  })
  return { create: mutation.mutateAsync, ...acting(mutation) }
}
