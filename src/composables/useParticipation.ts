import type { AppointInput, HandOverInput } from '@shared/api/participation'
import { useMutation, useQueryClient } from '@tanstack/vue-query'
import { toValue, type MaybeRefOrGetter } from 'vue'
import { appoint, endPart, handOver } from '@/api/participation'
import { acting } from './asking'

/** Appointing people to a calculation, handing a part over, ending one. */
export const useParticipation = (calculationId: MaybeRefOrGetter<string>) => {
  const client = useQueryClient()
  const onSuccess = () =>
    Promise.all(
      ['calculation', 'revision', 'calculations', 'in-tray'].map((key) =>
        client.invalidateQueries({ queryKey: [key] }),
      ),
    )
  const appointing = useMutation({
    mutationFn: (body: AppointInput) => appoint(toValue(calculationId), body),
    onSuccess,
  })
  const handingOver = useMutation({
    mutationFn: ({ id, ...body }: HandOverInput & { id: string }) =>
      handOver(toValue(calculationId), id, body),
    onSuccess,
  })
  const ending = useMutation({ mutationFn: (id: string) => endPart(toValue(calculationId), id), onSuccess })
  return {
    appointing: { appoint: appointing.mutateAsync, ...acting(appointing) },
    handingOver: { handOver: handingOver.mutateAsync, ...acting(handingOver) },
    ending: { end: ending.mutateAsync, ...acting(ending) },
  }
}
