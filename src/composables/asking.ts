import type { UseMutationReturnType, UseQueryReturnType } from '@tanstack/vue-query'
import { computed } from 'vue'
import type { Permission } from '@shared/review/permissions'
import { ApiError } from '@/api/request'

const always: Permission = { allowed: true, reason: '' }

/**
 * What a page needs to know of a question that is on its way: the same for every composable. One that the
 * person may not ask is answered with the reason, without troubling the server.
 */
export const asking = <Data>(query: UseQueryReturnType<Data, Error>, permission: Permission = always) => ({
  isLoading: computed(() => query.isPending.value && query.fetchStatus.value !== 'idle'),
  /** Only where there is nothing to show: an old answer stays on the page while a new one fails. */
  error: computed(() => {
    if (!permission.allowed) return new ApiError(permission.reason, 403, 'not-allowed')
    return query.data.value === undefined ? query.error.value : null
  }),
  retry: () => void query.refetch(),
})

/** What a form needs to know of an act: whether it is being done, and why it was refused, by field. */
export const acting = <Data, Variables>(
  mutation: UseMutationReturnType<Data, Error, Variables, unknown>,
) => ({
  isDoing: computed(() => mutation.isPending.value),
  refusal: computed(() => mutation.error.value),
  /** The message for one field of the request, by its path. */
  wrong: (path: string) =>
    mutation.error.value instanceof ApiError ? mutation.error.value.fields[path] : undefined,
  reset: () => mutation.reset(),
})
