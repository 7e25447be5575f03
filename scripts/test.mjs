// Everything that must hold, from a fresh clone: packages, browser, lint, types, unit, published checks, access,
// robustness, build, browser tests. Each part runs even when one before it failed; the last line is the count.
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import { build, checkNode, installPackages, loadSettings, run } from './steps.mjs';

checkNode();
loadSettings();
installPackages();
installDebianTools();
rmSync('build/test-results', { recursive: true, force: true });
mkdirSync('build/test-results', { recursive: true });

let passed = 0;
let failed = 0;
const failures = [];

count('lint', run(process.execPath, ['node_modules/@biomejs/biome/bin/biome', 'check', '.'], { mayFail: true }) === 0);
run(process.execPath, ['node_modules/next/dist/bin/next', 'typegen'], { mayFail: true, quiet: true });
count('types', run(process.execPath, ['node_modules/typescript/bin/tsc', '--noEmit'], { mayFail: true }) === 0);
run(process.execPath, ['scripts/build-workers.mjs']);
vitest();
build();
playwright();

for (const line of failures) console.log(`FAILED: ${line}`);
console.log(`${passed} passed, ${failed} failed`);
process.exit(failed === 0 && passed > 0 ? 0 : 1);

function count(name, ok) {
  if (ok) passed += 1;
  else {
    failed += 1;
    failures.push(name);
  }
}

function vitest() {
  const report = 'build/test-results/vitest.json';
  const code = run(
    process.execPath,
    ['node_modules/vitest/vitest.mjs', 'run', '--reporter=dot', '--reporter=json', `--outputFile.json=${report}`],
    { mayFail: true },
  );
  if (!existsSync(report)) return count('unit, published, access and robustness tests (no report)', false);
  const result = JSON.parse(readFileSync(report, 'utf8'));
  passed += result.numPassedTests;
  failed += result.numFailedTests;
  for (const file of result.testResults) {
    for (const test of file.assertionResults) if (test.status === 'failed') failures.push(`${file.name}: ${test.fullName}`);
    if (file.status === 'failed' && file.assertionResults.length === 0)
      count(`${file.name} did not load: ${file.message}`, false);
  }
  // An unhandled rejection fails the run without failing a test.
  if (code !== 0 && failures.length === 0)
    count('unit, published, access and robustness tests (ended with a fault outside a test)', false);
}

function playwright() {
  const report = 'build/test-results/playwright.json';
  const code = run(process.execPath, ['node_modules/@playwright/test/cli.js', 'test'], {
    mayFail: true,
    env: { PLAYWRIGHT_JSON_OUTPUT_FILE: report, NODE_ENV: 'production' },
  });
  if (!existsSync(report)) return count('browser tests (no report)', false);
  const result = JSON.parse(readFileSync(report, 'utf8'));
  passed += result.stats.expected + result.stats.flaky;
  failed += result.stats.unexpected;
  for (const suite of result.suites) collect(suite, []);
  if (code !== 0 && result.stats.unexpected === 0) count('browser tests (ended with a fault outside a test)', false);
}

function collect(suite, above) {
  const names = [...above, suite.title];
  for (const spec of suite.specs ?? []) if (!spec.ok) failures.push([...names, spec.title].join(' › '));
  for (const child of suite.suites ?? []) collect(child, names);
}

/** The browser and the readers that exports are opened with come from Debian's packages. */
function installDebianTools() {
  const wanted = {
    chromium: '/usr/bin/chromium',
    'poppler-utils': '/usr/bin/pdftotext',
    'gdal-bin': '/usr/bin/ogrinfo',
    unzip: '/usr/bin/unzip',
  };
  const missing = Object.entries(wanted).filter(([, path]) => !existsSync(path));
  if (missing.length === 0) return;
  const names = missing.map(([name]) => name);
  console.log(`Installing from Debian: ${names.join(', ')}…`);
  const root = process.getuid?.() === 0 ? [] : ['sudo'];
  const [command, ...args] = [...root, 'apt-get'];
  const env = { DEBIAN_FRONTEND: 'noninteractive' };
  run(command, [...args, 'update'], { quiet: true, env });
  run(command, [...args, 'install', '-y', '--no-install-recommends', ...names], { quiet: true, env });
}
