import { fileURLToPath } from 'node:url'
import { defineConfig } from 'vite'

const folder = (path: string) => fileURLToPath(new URL(path, import.meta.url))

/** The server as plain modules for Node: one entry for every process that is started by itself. */
export default defineConfig({
  resolve: {
    alias: { '@shared': folder('./shared'), '@server': folder('./server') },
  },
  build: {
    ssr: true,
    target: 'node20',
    outDir: 'dist/server',
    emptyOutDir: true,
    sourcemap: true,
    rolldownOptions: {
      input: {
        main: folder('./server/main.ts'),
        prepare: folder('./server/cli/prepare.ts'),
        migrate: folder('./server/cli/migrate.ts'),
        demo: folder('./server/cli/demo.ts'),
        evaluationWorker: folder('./server/evaluation/worker.ts'),
        press: folder('./server/printing/press.ts'),
      },
      output: { entryFileNames: '[name].js', format: 'es' },
    },
  },
})
