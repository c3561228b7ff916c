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
      testTimeout: 120_000,
      hookTimeout: 180_000,
    },
  }),
)
