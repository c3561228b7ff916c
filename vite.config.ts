import { fileURLToPath } from 'node:url'
import vue from '@vitejs/plugin-vue'
import { defineConfig } from 'vite'
import vuetify from 'vite-plugin-vuetify'

const folder = (path: string) => fileURLToPath(new URL(path, import.meta.url))

export default defineConfig({
  plugins: [vue(), vuetify({ autoImport: true })],
  resolve: {
    alias: { '@shared': folder('./shared'), '@server': folder('./server'), '@': folder('./src') },
    // Two copies of these break everything that shares a document or a schema.
    dedupe: ['yjs', 'y-protocols', 'lib0', 'prosemirror-model', 'prosemirror-state', 'vue'],
  },
  worker: { format: 'es' },
  build: { outDir: 'dist/client', sourcemap: true, emptyOutDir: true },
})
