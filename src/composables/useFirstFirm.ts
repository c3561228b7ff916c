import { useMutation } from '@tanstack/vue-query'
import { makeFirstFirm } from '@/api/setup'
import { useSessionStore } from '@/stores/session'
import { acting } from './asking'

/** Making the installation's first firm and its administrator, who is signed in by it. */
export const useFirstFirm = () => {
  const session = useSessionStore()
  const mutation = useMutation({ mutationFn: makeFirstFirm, onSuccess: session.begin })
  return { make: mutation.mutateAsync, ...acting(mutation) }
}
