import vue from '@vitejs/plugin-vue'
import { defineConfig } from 'vitest/config'

export default defineConfig({
  plugins: [vue()],
  build: { outDir: '.build/client', target: 'es2022' },
  test: {
    include: ['tests/**/*.test.ts'],
    globalSetup: 'tests/support/global-setup.ts',
    testTimeout: 20_000,
    hookTimeout: 60_000,
    pool: 'forks',
    maxWorkers: 2,
  },
})
