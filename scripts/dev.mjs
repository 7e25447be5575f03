// Development: packages, assets, workers, database, demo, then `next dev` on HOST:PORT.
import { spawn } from 'node:child_process';
import { checkNode, installPackages, loadSettings, run, runScript } from './steps.mjs';

checkNode();
loadSettings();
installPackages();
process.env.HOST ||= '127.0.0.1';
process.env.PORT ||= '3000';
run(process.execPath, ['scripts/prepare-assets.mjs']);
run(process.execPath, ['scripts/build-workers.mjs']);
runScript('scripts/migrate.ts');
runScript('scripts/seed.ts');
const server = spawn(
  process.execPath,
  ['node_modules/next/dist/bin/next', 'dev', '--hostname', process.env.HOST, '--port', process.env.PORT],
  { stdio: 'inherit' },
);
for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => server.kill(signal));
server.on('exit', (code) => process.exit(code ?? 0));
