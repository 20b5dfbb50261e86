import { fileURLToPath } from 'node:url'
import { defineConfig } from 'vitest/config'

const here = (path: string) => fileURLToPath(new URL(path, import.meta.url))
const alias = { '#shared': here('./shared'), '#server': here('./server'), '~': here('./app') }

export default defineConfig({
  resolve: { alias },
  test: {
    projects: [
      { extends: true, test: { name: 'unit', include: ['tests/unit/**/*.test.ts'] } },
      { extends: true, test: { name: 'reference', include: ['tests/reference/**/*.test.ts'] } },
      { extends: true, test: { name: 'api', include: ['tests/api/**/*.test.ts'], globalSetup: ['tests/api/global-setup.ts'], testTimeout: 30_000 } },
    ],
  },
})
