import { useQuery } from '@tanstack/vue-query'
import { computed, toValue, type MaybeRefOrGetter } from 'vue'
import { listTemplates, readTemplate } from '@/api/templates'
import { useSessionStore } from '@/stores/session'
import { asking } from './asking'

/** The templates that a new calculation can begin with. */
export const useTemplates = () => {
  const session = useSessionStore()
  const query = useQuery({
    queryKey: ['templates'],
    queryFn: ({ signal }) => listTemplates(signal),
    enabled: computed(() => session.allows('see-templates').allowed),
  })
  return {
    templates: computed(() => query.data.value?.templates ?? []),
    ...asking(query, session.allows('see-templates')),
  }
}

/** One template with its sheet and the form of its givens. */
export const useTemplate = (name: MaybeRefOrGetter<string>) => {
  const query = useQuery({
    queryKey: computed(() => ['template', toValue(name)]),
    queryFn: ({ signal }) => readTemplate(toValue(name), signal),
  })
  return { template: computed(() => query.data.value), ...asking(query) }
}
