import { useLocalStorage, usePreferredDark } from '@vueuse/core'
import { defineStore } from 'pinia'
import { computed } from 'vue'

/** Light, night, or as the device says; and whether single letters act on a focused line. Kept on this device. */
export const useAppearanceStore = defineStore('appearance', () => {
  const wish = useLocalStorage<'light' | 'night' | 'system'>('appearance', 'system')
  const lettersAct = useLocalStorage('letters-act', true)
  const deviceIsDark = usePreferredDark()

  const appearance = computed<'light' | 'night'>(() =>
    wish.value === 'system' ? (deviceIsDark.value ? 'night' : 'light') : wish.value,
  )

  return { wish, lettersAct, appearance }
})
