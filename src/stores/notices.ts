import { defineStore } from 'pinia'
import { ref } from 'vue'

export interface Notice {
  text: string
  /** One thing that can be done about it, such as *Undo*. */
  action?: { label: string; act: () => void }
}

/** One message at a time at the window's foot; said politely to screen readers. */
export const useNoticeStore = defineStore('notices', () => {
  const current = ref<Notice | null>(null)
  const say = (text: string, action?: Notice['action']) => {
    current.value = { text, ...(action ? { action } : {}) }
  }
  const dismiss = () => {
    current.value = null
  }
  return { current, say, dismiss }
})
