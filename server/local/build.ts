import { join } from 'node:path'
import { pathToFileURL } from 'node:url'
import { build as bundle } from 'esbuild'
import { build as buildClient } from 'vite'

const root = join(import.meta.dirname, '../..')

/**
 * Builds the product for production: the client as static files, the server and the migrations as
 * bundles that find their packages in node_modules, so the server folder lies inside the checkout.
 */
export async function buildProduct(folders: { client: string; server: string }): Promise<void> {
  await buildClient({
    root,
    logLevel: 'warn',
    build: { outDir: folders.client, emptyOutDir: true },
  })
  await bundle({
    absWorkingDir: root,
    entryPoints: {
      main: 'server/main.ts',
      thread: 'server/jobs/thread.ts',
      analysisThread: 'server/features/analyses/analysisThread.ts',
      migrate: 'db/migrate.ts',
    },
    bundle: true,
    platform: 'node',
    format: 'esm',
    target: 'node20',
    packages: 'external',
    sourcemap: true,
    outdir: folders.server,
    logLevel: 'warning',
  })
}

if (process.argv[1] && import.meta.url === pathToFileURL(process.argv[1]).href)
  await buildProduct({ client: join(root, 'dist/client'), server: join(root, 'dist/server') })
