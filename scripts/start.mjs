// One command from a fresh clone to a running Hilum: install, build, migrate, seed the demo on the first run, serve.
import { spawn } from 'node:child_process';
import { createServer } from 'node:net';
import { build, checkNode, installPackages, loadSettings, runScript } from './steps.mjs';

checkNode();
loadSettings();
const host = process.env.HOST || '127.0.0.1';
const port = process.env.PORT || '3000';
process.env.HOST = host;
process.env.PORT = port;

await refuseTakenPort();
installPackages();
build();
process.env.NODE_ENV = 'production';
runScript('scripts/migrate.ts');
runScript('scripts/seed.ts');

const server = spawn(process.execPath, ['node_modules/next/dist/bin/next', 'start', '--hostname', host, '--port', port], {
  stdio: 'inherit',
});
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => server.kill('SIGTERM'));
server.on('exit', (code) => process.exit(code ?? 0));

// Said before minutes of building, not after.
function refuseTakenPort() {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once('error', (error) => {
      console.error(
        error.code === 'EADDRINUSE'
          ? `Port ${port} on ${host} is taken. Stop what runs there, or choose another: PORT=3001 npm start`
          : `Cannot listen on ${host}:${port}: ${error.message}`,
      );
      process.exit(1);
    });
    probe.listen(Number(port), host, () => probe.close(resolve));
  });
}
