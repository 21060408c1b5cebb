import { readdirSync } from 'node:fs'
import { readFile } from 'node:fs/promises'
import { basename } from 'node:path'
import vue from '@vitejs/plugin-vue'
import { transformWithOxc } from 'vite'
import type { Plugin } from 'vite'
import { VitePWA } from 'vite-plugin-pwa'
import { defineConfig } from 'vitest/config'

/** The server itself and each command of server/cli, built side by side. */
const serverEntries = (): Record<string, string> => ({
  main: 'server/main.ts',
  ...Object.fromEntries(readdirSync('server/cli').map((file) => [`cli/${basename(file, '.ts')}`, `server/cli/${file}`])),
})

/** Areas of the language file that the pages before the sign-in need; they stay small. */
const FIRST_AREAS = ['common', 'shell', 'account', 'units']
const PART = /^(.*\/shared\/language\/[\w-]+\.ts)\?(first|rest)$/

/** What the browser's build leaves out; src/language-compiler.ts reads the messages there. */
const LEFT_OUT = {
  __VUE_PROD_DEVTOOLS__: false,
  __VUE_I18N_LEGACY_API__: false,
  __VUE_I18N_FULL_INSTALL__: false,
  __INTLIFY_PROD_DEVTOOLS__: false,
  __INTLIFY_DROP_MESSAGE_COMPILER__: true,
}

export default defineConfig(({ command, isSsrBuild }) => ({
  plugins: [vue(), languageParts(), command === 'build' && !isSsrBuild ? [houseIcon(), installable()] : []],
  define: command === 'build' && !isSsrBuild ? LEFT_OUT : {},
  // Packages stay in node_modules for the server: only our own files are bundled, with their decorators' metadata.
  build: isSsrBuild
    ? { outDir: '.build/server', target: 'node20', copyPublicDir: false, sourcemap: true, rolldownOptions: { input: serverEntries(), checks: { bundlerTimings: false } } }
    : { outDir: '.build/client', target: 'es2022', rolldownOptions: { checks: { bundlerTimings: false } } },
  test: {
    include: ['tests/**/*.test.ts'],
    environment: 'node',
    globalSetup: 'tests/support/global-setup.ts',
    testTimeout: 60_000,
    hookTimeout: 180_000,
    pool: 'forks',
    maxWorkers: 2,
  },
}))

/**
 * Takes a language file apart for the browser: `en.ts?first` has the words before the sign-in, `en.ts?rest`
 * all others. So a language stays one file for whoever writes it.
 */
function languageParts(): Plugin {
  return {
    name: 'language-parts',
    async load(id) {
      const [, file, part] = PART.exec(id) ?? []
      if (!file) return null
      this.addWatchFile(file)
      const { code } = await transformWithOxc(await readFile(file, 'utf8'), file)
      const language: Record<string, Record<string, unknown>> = await import(`data:text/javascript,${encodeURIComponent(code)}`)
      const areas = Object.entries(language[basename(file, '.ts')] ?? {})
      const words = areas.filter(([area]) => FIRST_AREAS.includes(area) === (part === 'first'))
      return { code: `export const words = ${JSON.stringify(Object.fromEntries(words))}`, moduleType: 'js' }
    },
  }
}

/** The mark of the house under a name that the manifest can give. */
function houseIcon(): Plugin {
  return {
    name: 'house-icon',
    async generateBundle() {
      this.emitFile({ type: 'asset', fileName: 'icon.svg', source: await readFile('src/assets/mark.svg') })
    },
  }
}

/**
 * Makes the client installable and its files usable without a line. The page itself is not among the files laid
 * up in advance: it carries the nonce of its own content policy, so the last one that the server gave is kept whole.
 */
const installable = () => VitePWA({
  injectRegister: null,
  registerType: 'autoUpdate',
  manifest: {
    name: 'Weighback', short_name: 'Weighback', description: 'Every pound accounted for.', start_url: '/', display: 'standalone',
    background_color: '#f4ede0', theme_color: '#12392f', icons: [{ src: '/icon.svg', sizes: 'any', type: 'image/svg+xml', purpose: 'any' }],
  },
  workbox: {
    globPatterns: ['**/*.{js,css,woff2,svg}'],
    navigateFallback: null,
    cleanupOutdatedCaches: true,
    runtimeCaching: [{
      urlPattern: ({ request, url }) => request.mode === 'navigate' && !url.pathname.startsWith('/api/'),
      handler: 'NetworkFirst',
      options: { cacheName: 'page', networkTimeoutSeconds: 4, plugins: [{ cacheKeyWillBeUsed: () => Promise.resolve('/') }] },
    }],
  },
})
