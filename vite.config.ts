import { fileURLToPath } from 'node:url'
import vue from '@vitejs/plugin-vue'
import { defineConfig } from 'vite'
import vuetify from 'vite-plugin-vuetify'

const folder = (path: string) => fileURLToPath(new URL(path, import.meta.url))

/** Parts of the client that change seldom and are wanted together: one file each, kept by browsers across versions. */
const chunks = [
  { name: 'mathematics', test: /node_modules[\\/]katex[\\/]/, priority: 30 },
  {
    name: 'editor',
    test: /node_modules[\\/](@tiptap|prosemirror-[^\\/]+|linkifyjs|yjs|y-[^\\/]+|lib0)[\\/]/,
    priority: 20,
  },
  { name: 'frame', test: /node_modules[\\/](@?vue|vue-router|pinia|@vueuse|@tanstack)[\\/]/, priority: 10 },
]

/** The server that `npm run dev` has started; it believes requests that come from its own origin. */
const api = process.env['TORFOLIO_API'] ?? 'http://127.0.0.1:4180'
const toServer = { target: api, headers: { origin: api } }

export default defineConfig({
  server: { proxy: { '/api': toServer, '/collaboration': { ...toServer, ws: true } } },
  plugins: [vue(), vuetify({ autoImport: true })],
  resolve: {
    alias: { '@shared': folder('./shared'), '@server': folder('./server'), '@': folder('./src') },
    // Two copies of these break everything that shares a document or a schema.
    dedupe: ['yjs', 'y-protocols', 'lib0', 'prosemirror-model', 'prosemirror-state', 'vue'],
  },
  // The server puts its nonce in this place in every page that it sends.
  html: { cspNonce: '{{nonce}}' },
  worker: { format: 'es' },
  build: {
    outDir: 'dist/client',
    sourcemap: true,
    emptyOutDir: true,
    // Small files would become data: addresses, which the policy for fonts refuses.
    assetsInlineLimit: 0,
    rolldownOptions: { output: { codeSplitting: { groups: chunks } } },
  },
})
