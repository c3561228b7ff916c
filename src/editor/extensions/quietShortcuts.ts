import type { Extensions } from '@tiptap/core'

type Shortcuts = Record<string, () => boolean>

/**
 * The page's extensions without the shortcuts that collide with the sheet's keys: no Ctrl+Alt, no
 * Ctrl+Enter for a line break, and Tab leaves the sheet instead of walking through cells and lists.
 */
const kept: Record<string, readonly string[]> = {
  paragraph: [],
  heading: [],
  hardBreak: ['Shift-Enter'],
  table: ['Backspace', 'Mod-Backspace', 'Delete', 'Mod-Delete'],
  listItem: ['Enter'],
  bulletList: ['Mod-Shift-8'],
  orderedList: ['Mod-Shift-7'],
}

export const withQuietShortcuts = (extensions: Extensions): Extensions =>
  extensions.map((extension) => {
    const names = kept[extension.name]
    if (!names || !('extend' in extension)) return extension
    return extension.extend({
      addKeyboardShortcuts() {
        const all = (this.parent?.() ?? {}) as Shortcuts
        return Object.fromEntries(Object.entries(all).filter(([key]) => names.includes(key)))
      },
    })
  })
