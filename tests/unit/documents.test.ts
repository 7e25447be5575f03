import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';

/** Documents that speak of software that is gone are worse than none. */
const documents = ['README.md', 'DEVELOPERS.md', 'features/placement/ENGINE.md'];

function citedPaths(text: string): string[] {
  return [...text.matchAll(/`([\w().[\]/-]+)`/g)]
    .map((match) => match[1] as string)
    .filter((path) => /^(app|features|db|lib|public|scripts|tests|\.ci)\//.test(path));
}

describe('the documents are true', () => {
  test.each(documents)('%s cites only paths that exist', (document) => {
    const text = readFileSync(document, 'utf8');
    expect(citedPaths(text).length).toBeGreaterThan(0);
    expect(citedPaths(text).filter((path) => !existsSync(path))).toEqual([]);
  });

  test('every factor of the ledger is in the engine manual', () => {
    const manual = readFileSync('features/placement/ENGINE.md', 'utf8');
    const factors = readdirSync('features/placement/engine/factors')
      .filter((file) => file.endsWith('.ts') && file !== 'index.ts')
      .flatMap((file) =>
        [...readFileSync(`features/placement/engine/factors/${file}`, 'utf8').matchAll(/^\s+label: '([^']+)'/gm)].map(
          (match) => match[1] as string,
        ),
      );
    expect(factors.length).toBeGreaterThan(10);
    expect(factors.filter((label) => !manual.toLowerCase().includes(label.toLowerCase()))).toEqual([]);
  });

  test('every npm command is explained in DEVELOPERS.md or README.md', () => {
    const words = readFileSync('README.md', 'utf8') + readFileSync('DEVELOPERS.md', 'utf8');
    const commands = Object.keys(
      (JSON.parse(readFileSync('package.json', 'utf8')) as { scripts: Record<string, string> }).scripts,
    );
    expect(
      commands.filter(
        (name) =>
          !words.includes(`npm ${name}`) && !words.includes(`npm run ${name}`) && !words.includes(`npm run --silent ${name}`),
      ),
    ).toEqual([]);
  });

  test('every setting of the environment is in .env.example', () => {
    const example = readFileSync('.env.example', 'utf8');
    const settings = [...readFileSync('lib/env.ts', 'utf8').matchAll(/^ {2}([A-Z][A-Z_]+):/gm)].map(
      (match) => match[1] as string,
    );
    expect(settings.length).toBeGreaterThan(8);
    expect(settings.filter((name) => name !== 'NODE_ENV' && !example.includes(name))).toEqual([]);
  });
});
