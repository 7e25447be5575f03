import { readdirSync, readFileSync, statSync } from 'node:fs';
import { join, relative } from 'node:path';
import { describe, expect, test } from 'vitest';

/** Who may import whom. Highest first: a feature may import only from features below it. */
const ORDER = ['plans', 'placement', 'trials', 'line-up', 'soil', 'fields', 'imports', 'growers', 'accounts'];
/** The trade's words (drainage classes, tolerances…): pure lists that every feature may read. */
const VOCABULARY = 'features/placement/engine/model';
const PURE = [
  'features/placement/engine/',
  'features/placement/climate/',
  'features/trials/statistics/',
  'features/plans/seed-math.ts',
  'features/fields/acres.ts',
  'features/soil/surface.ts',
  'features/soil/surface/',
  'features/soil/lime.ts',
];
const FRAMEWORKS = /^(react|next|drizzle-orm|@libsql|server-only|zod|maplibre-gl)/;

interface Import {
  file: string;
  target: string;
  typeOnly: boolean;
}

function sourceFiles(folder: string): string[] {
  return readdirSync(folder).flatMap((name) => {
    const path = join(folder, name);
    if (statSync(path).isDirectory()) return sourceFiles(path);
    return /\.tsx?$/.test(name) ? [path] : [];
  });
}

const files = ['app', 'features', 'db', 'lib'].flatMap(sourceFiles);

/** Import targets as repository paths (`features/x/y`) or package names. */
const imports: Import[] = files.flatMap((file) => {
  const text = readFileSync(file, 'utf8');
  const found = [...text.matchAll(/(?:^|\n)\s*(?:import|export)\s+(type\s+)?(?:[^'";]*?\sfrom\s+)?['"]([^'"]+)['"]/g)];
  const dynamic = [...text.matchAll(/import\(\s*['"]([^'"]+)['"]\s*\)/g)].map((match) => ['', undefined, match[1]] as const);
  return [...found.map((match) => ['', match[1], match[2]] as const), ...dynamic].map(([, type, raw]) => ({
    file,
    typeOnly: type !== undefined,
    target: resolveTarget(file, raw as string),
  }));
});

function resolveTarget(file: string, raw: string): string {
  if (raw.startsWith('@/')) return raw.slice(2);
  if (raw.startsWith('.')) return relative('.', join(file, '..', raw));
  return raw;
}

function featureOf(path: string): string | null {
  return /^features\/([^/]+)\//.exec(`${path}/`)?.[1] ?? null;
}

function wrong(rule: (one: Import) => boolean): string[] {
  return imports.filter(rule).map((one) => `${one.file} → ${one.target}`);
}

describe('who may import whom', () => {
  test('the imports are really read', () => {
    expect(imports.length).toBeGreaterThan(40);
    expect(imports).toContainEqual({ file: 'db/client.ts', target: 'lib/env', typeOnly: false });
  });

  test('lib imports neither features, db nor app, but for the mail outbox, which is a table', () => {
    expect(
      wrong(
        (one) =>
          one.file.startsWith('lib/') &&
          /^(features|app|db)\//.test(one.target) &&
          !one.file.startsWith('lib/mail/') &&
          !one.typeOnly,
      ),
    ).toEqual([]);
  });

  test('db imports nothing of features but types, outside the demo scenario', () => {
    expect(
      wrong(
        (one) =>
          one.file.startsWith('db/') && !one.file.startsWith('db/seed/') && /^(features|app)\//.test(one.target) && !one.typeOnly,
      ),
    ).toEqual([]);
  });

  test('no feature imports from app', () => {
    expect(wrong((one) => one.file.startsWith('features/') && one.target.startsWith('app/'))).toEqual([]);
  });

  test('a feature imports only from features below it', () => {
    expect(
      wrong((one) => {
        const from = featureOf(one.file);
        const to = featureOf(one.target);
        if (!from || !to || from === to || one.typeOnly || one.target === VOCABULARY) return false;
        return ORDER.indexOf(to) < ORDER.indexOf(from);
      }),
    ).toEqual([]);
  });

  test('no feature calls the changes, actions or components of another (the factor colours are shared)', () => {
    expect(
      wrong((one) => {
        const from = featureOf(one.file);
        const to = featureOf(one.target);
        if (!from || !to || from === to || one.typeOnly) return false;
        const inside = one.target.replace(`features/${to}/`, '').replace(/\.tsx?$/, '');
        if (/^(changes|actions)(\/|$)/.test(inside)) return true;
        if (inside.startsWith('components/')) return !inside.startsWith('components/factor-colours');
        return false;
      }),
    ).toEqual([]);
  });

  test('pure computation knows no framework, no database and no other feature', () => {
    expect(
      wrong((one) => {
        if (!PURE.some((path) => one.file.startsWith(path))) return false;
        if (one.typeOnly) return false;
        if (FRAMEWORKS.test(one.target) || /^(app|db)\//.test(one.target) || one.target.startsWith('node:')) return true;
        if (one.target.startsWith('lib/')) return !/^lib\/(units|dates)/.test(one.target);
        return (
          one.target.startsWith('features/') &&
          !PURE.some((path) => `${one.target}/`.startsWith(path) || `${one.target}.ts` === path)
        );
      }),
    ).toEqual([]);
  });

  test('components import no queries, changes or database', () => {
    expect(
      wrong(
        (one) =>
          /\/components\//.test(one.file) &&
          !one.typeOnly &&
          /(^db\/|\/(queries|changes|inputs)$|^drizzle-orm|^@libsql)/.test(one.target),
      ),
    ).toEqual([]);
  });

  test('only lib/map imports MapLibre', () => {
    expect(
      wrong((one) => one.target.startsWith('maplibre-gl') && !one.file.startsWith('lib/map/') && !one.target.endsWith('.css')),
    ).toEqual([]);
  });

  test('there are no barrels: an index file is a list, and only the known ones exist', () => {
    const lists = [
      'db/schema/index.ts',
      'db/seed/index.ts',
      'features/placement/engine/factors/index.ts',
      'features/fields/readers/index.ts',
      'features/soil/readers/index.ts',
    ];
    expect(files.filter((file) => /\/index\.tsx?$/.test(file) && !lists.includes(file))).toEqual([]);
  });

  test('every query of a feature asks for the viewer first', () => {
    const shy = files
      .filter((file) => /features\/[^/]+\/queries(\/[^/]+)?\.ts$/.test(file))
      .flatMap((file) => {
        const text = readFileSync(file, 'utf8');
        return [
          ...text.matchAll(/export\s+(?:async\s+function|const)\s+(\w+)\s*(?:=\s*(?:cache\()?\s*(?:async\s*)?)?\(\s*(\w+)/g),
        ]
          .filter((match) => !['viewer', '_viewer'].includes(match[2] as string))
          .map((match) => `${file}: ${match[1]}(${match[2]}…)`);
      });
    expect(shy).toEqual([]);
  });

  test('every queries file keeps itself on the server', () => {
    const open = files
      .filter((file) => /features\/[^/]+\/queries\.ts$/.test(file))
      .filter((file) => !readFileSync(file, 'utf8').includes("import 'server-only'"));
    expect(open).toEqual([]);
  });
});
