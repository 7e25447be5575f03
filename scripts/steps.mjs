// What the set-up commands share: running a step, and knowing whether the packages and the build are up to date.
import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';

/** Runs a command with its output shown; ends this process with its code when it fails, unless `mayFail`. */
export function run(command, args, { env = {}, mayFail = false, quiet = false } = {}) {
  const result = spawnSync(command, args, { stdio: quiet ? 'pipe' : 'inherit', env: { ...process.env, ...env } });
  if (result.error) throw result.error;
  if (result.status !== 0 && !mayFail) {
    if (quiet) process.stderr.write(`${result.stdout}\n${result.stderr}\n`);
    console.error(`Stopped: ${command} ${args.join(' ')} ended with code ${result.status}.`);
    process.exit(result.status ?? 1);
  }
  return result.status ?? 1;
}

/** Runs one of the project's TypeScript scripts. */
export function runScript(script, args = [], options = {}) {
  return run(process.execPath, ['--import', 'tsx', '--conditions=react-server', script, ...args], options);
}

function hashOf(paths) {
  const hash = createHash('sha256');
  for (const path of paths) hash.update(path).update('\0').update(readFileSync(path)).update('\0');
  return hash.digest('hex');
}

function filesUnder(folder, skip = new Set()) {
  if (!existsSync(folder)) return [];
  if (statSync(folder).isFile()) return [folder];
  return readdirSync(folder)
    .sort()
    .filter((name) => !skip.has(join(folder, name)))
    .flatMap((name) => filesUnder(join(folder, name), skip));
}

function mark(file, value) {
  mkdirSync(dirname(file), { recursive: true });
  writeFileSync(file, value);
}

function marked(file) {
  return existsSync(file) ? readFileSync(file, 'utf8') : '';
}

/** Refuses a Node that cannot run the project, with the version that can. */
export function checkNode() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  if (major < 20 || (major === 20 && minor < 9)) {
    console.error(`Hilum needs Node 20.9 or newer; this is ${process.versions.node}.`);
    process.exit(1);
  }
}

/** Reads .env, where there is one, for this process and the ones it starts. */
export function loadSettings() {
  if (existsSync('.env')) process.loadEnvFile('.env');
  process.env.NEXT_TELEMETRY_DISABLED = '1';
}

/** Installs packages when package-lock.json is not what is installed. */
export function installPackages() {
  const lock = hashOf(['package.json', 'package-lock.json']);
  const stamp = 'node_modules/.hilum-installed';
  if (marked(stamp) === lock) return;
  console.log('Installing packages…');
  run('npm', ['ci', '--no-audit', '--no-fund', '--include=dev'], { env: { NODE_ENV: 'development' } });
  mark(stamp, lock);
}

const BUILT_FROM = [
  'app',
  'db',
  'features',
  'lib',
  'public',
  'scripts',
  'package-lock.json',
  'next.config.mjs',
  'postcss.config.mjs',
  'tsconfig.json',
  'instrumentation.ts',
  'proxy.ts',
];

/** Builds for production when any source changed since the last build. */
export function build({ force = false } = {}) {
  const folder = process.env.HILUM_DIST_DIR || '.next';
  const stamp = join(folder, 'hilum-built');
  const sources = BUILT_FROM.flatMap((path) => filesUnder(path, new Set([join('public', 'map')])));
  // The tile address is part of the content security policy, which is fixed when building.
  const state = `${hashOf(sources.filter((path) => existsSync(path)))} ${process.env.HILUM_TILE_URL ?? ''}`;
  if (!force && marked(stamp) === state) return;
  console.log('Building…');
  run(process.execPath, ['scripts/prepare-assets.mjs']);
  run(process.execPath, ['scripts/build-workers.mjs']);
  run(process.execPath, ['node_modules/next/dist/bin/next', 'build'], { env: { NODE_ENV: 'production' } });
  mark(stamp, state);
}
