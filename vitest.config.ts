import { mergeConfig, defineConfig } from 'vitest/config'
import base from './vite.config.ts'

export default mergeConfig(
  base,
  defineConfig({
    test: {
      include: ['tests/**/*.test.ts'],
      environment: 'node',
      globalSetup: ['tests/support/globalSetup.ts'],
      setupFiles: ['tests/support/properties.ts'],
      pool: 'forks',
      maxWorkers: 2,
      // On a loaded machine a browser may be late once; what fails twice is red. Nowhere else is anything tried again.
      retry: process.env['CI'] ? 1 : 0,
      testTimeout: 120_000,
      hookTimeout: 180_000,
    },
  }),
)
