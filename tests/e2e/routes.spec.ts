import { readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from '@playwright/test';
import { demoPages } from './support/pages';

/** `app/(work)/fields/[fieldId]/page.tsx` → `/fields/[fieldId]`. */
function routesUnder(folder: string): string[] {
  return readdirSync(folder).flatMap((name) => {
    const path = join(folder, name);
    if (statSync(path).isDirectory()) return routesUnder(path);
    if (name !== 'page.tsx') return [];
    return [folder.replace(/^app/, '').replace(/\/\([^)]+\)/g, '') || '/'];
  });
}

function matches(route: string, path: string): boolean {
  const pattern = route.replace(/\[[^\]]+\]/g, '[^/]+');
  return new RegExp(`^${pattern}$`).test(path.split('?')[0] as string);
}

test('every page of the product is looked at', async () => {
  const pages = await demoPages();
  expect(routesUnder('app').filter((route) => !pages.some((one) => matches(route, one.path)))).toEqual([]);
});

test('every page behind sign-in sends a stranger to sign in', async ({ request }) => {
  const open: string[] = [];
  for (const { role, path } of await demoPages()) {
    if (role === 'signed out') continue;
    const response = await request.get(path, { maxRedirects: 0 });
    const away = response.status() >= 300 && response.status() < 400 && (response.headers().location ?? '').includes('/sign-in');
    if (!away) open.push(`${path}: ${response.status()}`);
  }
  expect(open).toEqual([]);
});
