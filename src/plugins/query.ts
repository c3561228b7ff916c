import { MutationCache, QueryCache, QueryClient } from '@tanstack/vue-query'
import { ApiError } from '@/api/request'
import { useSessionStore } from '@/stores/session'

/** A refusal will not change by asking again; a lost connection may. */
const worthAnotherTry = (failures: number, error: Error) =>
  failures < 2 && (!(error instanceof ApiError) || error.status === 0 || error.status >= 500)

/** The session ended at the server, elsewhere or by time: the frame then leads to the sign-in. */
const noticeSignedOut = (error: Error) => {
  if (error instanceof ApiError && error.code === 'not-signed-in') useSessionStore().end(true)
}

export const queryClient = new QueryClient({
  queryCache: new QueryCache({ onError: noticeSignedOut }),
  mutationCache: new MutationCache({ onError: noticeSignedOut }),
  defaultOptions: {
    queries: { staleTime: 15_000, retry: worthAnotherTry },
    mutations: { retry: false },
  },
})
