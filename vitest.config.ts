import { fileURLToPath } from 'node:url'
import { defineVitestProject } from '@nuxt/test-utils/config'
import { defineConfig } from 'vitest/config'

const here = (path: string) => fileURLToPath(new URL(path, import.meta.url))
const alias = { '#shared': here('./shared'), '#server': here('./server'), '~': here('./app') }

export default defineConfig({
  test: {
    projects: [
      { resolve: { alias }, test: { name: 'unit', setupFiles: ['tests/seeded.ts'], include: ['tests/unit/**/*.test.ts'], environment: 'node', testTimeout: 60_000 } },
      { resolve: { alias }, test: { name: 'checks', setupFiles: ['tests/seeded.ts'], include: ['tests/checks/**/*.test.ts'], environment: 'node', testTimeout: 60_000 } },
      { resolve: { alias }, test: { name: 'api', include: ['tests/api/**/*.test.ts'], environment: 'node', fileParallelism: false, testTimeout: 60_000, hookTimeout: 120_000 } },
      await defineVitestProject({
        test: { name: 'nuxt', include: ['tests/nuxt/**/*.test.ts'], environment: 'nuxt', hookTimeout: 60_000, testTimeout: 30_000, environmentOptions: { nuxt: { domEnvironment: 'happy-dom' } } },
      }),
    ],
  },
})
