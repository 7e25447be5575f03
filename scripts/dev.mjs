// Development: assets, database, then `next dev` on HOST:PORT.
import { spawn, spawnSync } from 'node:child_process';

const host = process.env.HOST || '127.0.0.1';
const port = process.env.PORT || '3000';
for (const step of [['scripts/prepare-assets.mjs'], ['--import', 'tsx', '--conditions=react-server', 'scripts/migrate.ts']]) {
  const result = spawnSync(process.execPath, step, { stdio: 'inherit' });
  if (result.status !== 0) process.exit(result.status ?? 1);
}
const server = spawn(process.execPath, ['node_modules/next/dist/bin/next', 'dev', '--hostname', host, '--port', port], {
  stdio: 'inherit',
});
for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => server.kill(signal));
server.on('exit', (code) => process.exit(code ?? 0));
