import { onScopeDispose, shallowRef, watch, type Ref } from 'vue'
import {
  openSheetConnection,
  type OpenSheetOptions,
  type SheetConnection,
} from '@/collaboration/sheetConnection'

/** Opens the live sheet of a document and closes it on leaving or when another document is shown. */
export const useSheetConnection = (options: Ref<OpenSheetOptions | undefined>) => {
  const connection = shallowRef<SheetConnection>()
  const failure = shallowRef<Error>()

  const close = (): void => {
    void connection.value?.close()
    connection.value = undefined
  }

  const stopWatching = watch(
    () => options.value?.documentId,
    async (documentId) => {
      close()
      failure.value = undefined
      const wanted = options.value
      if (!documentId || !wanted) return
      try {
        const opened = await openSheetConnection(wanted)
        if (options.value?.documentId === documentId) connection.value = opened
        else await opened.close()
      } catch (error) {
        failure.value = error instanceof Error ? error : new Error(String(error))
      }
    },
    { immediate: true },
  )
  onScopeDispose(() => {
    stopWatching()
    close()
  })

  return { connection, failure }
}
