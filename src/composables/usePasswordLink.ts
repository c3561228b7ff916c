import { useMutation, useQuery } from '@tanstack/vue-query'
import { computed } from 'vue'
import { lookUpLink, setPassword } from '@/api/session'
import { acting, asking } from './asking'

/** A one-time link: whose it is, and setting that person's password by it. */
export const usePasswordLink = (token: string) => {
  const query = useQuery({
    queryKey: ['link', token],
    queryFn: () => lookUpLink(token),
    enabled: token !== '',
    retry: false,
  })
  const mutation = useMutation({ mutationFn: (password: string) => setPassword({ token, password }) })
  return {
    link: computed(() => query.data.value),
    ...asking(query),
    setting: { set: mutation.mutateAsync, ...acting(mutation) },
  }
}
