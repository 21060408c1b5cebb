import vue from '@vitejs/plugin-vue'
import { defineConfig } from 'vitest/config'

const SERVER_ENTRIES = {
  main: 'server/main.ts',
  migrate: 'server/cli/migrate.ts',
  'load-demo': 'server/cli/load-demo.ts',
  'check-ledger': 'server/cli/check-ledger.ts',
}
const API_PORT = Number(process.env.WEIGHBACK_PORT ?? 8080)

export default defineConfig(({ isSsrBuild }) => ({
  plugins: [vue()],
  build: isSsrBuild
    ? { outDir: '.build/server', target: 'node20', emptyOutDir: true, minify: false, rollupOptions: { input: SERVER_ENTRIES } }
    : { outDir: '.build/client', target: 'es2022', emptyOutDir: true },
  server: { proxy: { '/api': { target: `http://127.0.0.1:${API_PORT}`, changeOrigin: false } } },
  test: {
    include: ['tests/**/*.test.ts'],
    globalSetup: 'tests/support/global-setup.ts',
    testTimeout: 20_000,
    hookTimeout: 60_000,
    pool: 'forks',
    maxWorkers: 2,
  },
}))
