import type { ChangeProject } from '@shared/api/projects'
import { useMutation, useQuery, useQueryClient } from '@tanstack/vue-query'
import { computed } from 'vue'
import { changeProject, createProject, listProjects } from '@/api/projects'
import { useSessionStore } from '@/stores/session'
import { acting, asking } from './asking'

/** The firm's projects. */
export const useProjects = () => {
  const session = useSessionStore()
  const query = useQuery({
    queryKey: ['projects'],
    queryFn: ({ signal }) => listProjects(signal),
    enabled: computed(() => session.allows('see-projects').allowed),
  })
  return {
    projects: computed(() => query.data.value?.projects ?? []),
    ...asking(query, session.allows('see-projects')),
  }
}

export const useNewProject = () => {
  const client = useQueryClient()
  const mutation = useMutation({
    mutationFn: createProject,
    onSuccess: () => client.invalidateQueries({ queryKey: ['projects'] }),
  })
  return { create: mutation.mutateAsync, ...acting(mutation) }
}

export const useProjectChange = () => {
  const client = useQueryClient()
  const mutation = useMutation({
    mutationFn: ({ id, ...change }: ChangeProject & { id: string }) => changeProject(id, change),
    onSuccess: () =>
      Promise.all(
        ['projects', 'calculations', 'calculation', 'revision'].map((key) =>
          client.invalidateQueries({ queryKey: [key] }),
        ),
      ),
  })
  return { change: mutation.mutateAsync, ...acting(mutation) }
}
