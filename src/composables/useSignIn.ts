import { useMutation, useQuery, useQueryClient } from '@tanstack/vue-query'
import { computed } from 'vue'
import type { Me } from '@shared/api/session'
import { chooseFirm, continueAs, listDemoPeople, signIn, signOut } from '@/api/session'
import { useSessionStore } from '@/stores/session'
import { acting, asking } from './asking'

/** Signing in by password or, in the demo, by one press; choosing a firm; signing out. */
export const useSignIn = () => {
  const session = useSessionStore()
  const client = useQueryClient()
  // Nothing that one person loaded is shown to the next.
  const onSuccess = (me: Me) => {
    client.clear()
    session.begin(me)
  }
  const byPassword = useMutation({ mutationFn: signIn, onSuccess })
  const byPress = useMutation({ mutationFn: continueAs, onSuccess })
  const firm = useMutation({ mutationFn: chooseFirm, onSuccess })
  return {
    byPassword: { signIn: byPassword.mutateAsync, ...acting(byPassword) },
    byPress: { continueAs: byPress.mutateAsync, ...acting(byPress) },
    firm: { choose: firm.mutateAsync, ...acting(firm) },
  }
}

export const useSignOut = () => {
  const session = useSessionStore()
  const client = useQueryClient()
  const mutation = useMutation({
    mutationFn: signOut,
    onSuccess: () => {
      session.end()
      client.clear()
    },
  })
  return { signOut: mutation.mutateAsync, ...acting(mutation) }
}

/** The people of the demo, each with what waits for them. */
export const useDemoPeople = () => {
  const session = useSessionStore()
  const query = useQuery({
    queryKey: ['demo-people'],
    queryFn: ({ signal }) => listDemoPeople(signal),
    enabled: computed(() => session.isDemo),
  })
  return { people: computed(() => query.data.value?.people ?? []), ...asking(query) }
}
