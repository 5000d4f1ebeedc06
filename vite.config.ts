import tailwindcss from '@tailwindcss/vite'
import react from '@vitejs/plugin-react'
import { defineConfig } from 'vitest/config'

/** The API's port on loopback; `npm start` sets it for both processes. */
const apiPort = Number(process.env.BREATHMARK_API_PORT ?? 4100)

export default defineConfig({
  plugins: [react(), tailwindcss()],
  server: {
    host: '127.0.0.1',
    strictPort: true,
    // The local database writes there all the time.
    watch: { ignored: ['**/.local/**', '**/test-results/**'] },
    proxy: { '/api': `http://127.0.0.1:${apiPort}`, '/auth': `http://127.0.0.1:${apiPort}` },
  },
  build: { outDir: 'dist/client', sourcemap: true },
  test: {
    include: ['tests/**/*.test.{ts,tsx}'],
    globalSetup: ['tests/support/globalSetup.ts'],
    testTimeout: 30_000,
    hookTimeout: 60_000,
  },
})
