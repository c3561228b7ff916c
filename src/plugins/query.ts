import { QueryClient } from '@tanstack/vue-query'
import { ApiError } from '@/api/request'

/** A refusal will not change by asking again; a lost connection may. */
const worthAnotherTry = (failures: number, error: Error) =>
  failures < 2 && !(error instanceof ApiError && error.status > 0 && error.status < 500)

export const queryClient = new QueryClient({
  defaultOptions: {
    queries: { staleTime: 15_000, retry: worthAnotherTry },
    mutations: { retry: false },
  },
})
