// Bundles every features/*/workers/*.ts into build/workers/NAME.mjs, so that a worker thread starts the same way under the
// production server, in development, in tests and at the command line.
import { existsSync, readdirSync } from 'node:fs';
import { basename, join } from 'node:path';
import { build } from 'esbuild';

export const WORKER_FOLDER = join('build', 'workers');

/** Source files of all workers. */
export function workerSources() {
  return readdirSync('features')
    .map((feature) => join('features', feature, 'workers'))
    .filter((folder) => existsSync(folder))
    .flatMap((folder) =>
      readdirSync(folder)
        .filter((file) => file.endsWith('.ts'))
        .map((file) => join(folder, file)),
    );
}

const sources = workerSources();
if (sources.length > 0) {
  await build({
    entryPoints: Object.fromEntries(sources.map((file) => [basename(file, '.ts'), file])),
    outdir: WORKER_FOLDER,
    outExtension: { '.js': '.mjs' },
    bundle: true,
    platform: 'node',
    target: 'node20',
    format: 'esm',
    packages: 'external',
    alias: { 'server-only': './tests/support/empty.ts', '@': '.' },
    logLevel: 'warning',
  });
}
