import { readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from '@playwright/test';
import { signInAs } from './support/demo';
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

test('a made-up id is not found, in words, for people who are signed in', async ({ browser, baseURL }) => {
  const context = await browser.newContext({ baseURL });
  await signInAs(context, baseURL as string, 'grower');
  for (const path of [
    '/fields/made-up',
    '/fields/made-up/facts',
    '/fields/made-up/compare',
    '/fields?operation=made-up',
    '/fields/import?operation=made-up',
    '/soil/import?operation=made-up',
    '/line-up/made-up',
    '/plans/made-up/2027',
    '/settings/audit',
    '/season',
    '/outbox',
    '/line-up/new',
    '/line-up/import',
    '/settings/people',
    '/settings/zones',
  ]) {
    const response = await context.request.get(path, { maxRedirects: 0 });
    expect([404, 307], path).toContain(response.status());
    if (response.status() === 404) expect(await response.text(), path).not.toContain('Application error');
  }
  await context.close();
});

test('what belongs to another operation is not found, page by page', async ({ browser, baseURL }) => {
  const leaks: string[] = [];
  const pages = (await demoPages()).filter(
    (one) => /\/(fields|growers|plans)\/[^?]{15,}/.test(one.path) || /operation=/.test(one.path),
  );
  expect(pages.length).toBeGreaterThan(6);
  for (const email of ['grower@bergan.example', 'rep2@otterprairie.example']) {
    const context = await browser.newContext({ baseURL });
    await signInAs(context, baseURL as string, email);
    for (const { path } of pages) {
      const response = await context.request.get(path, { maxRedirects: 0 });
      if (response.status() === 200) leaks.push(`${email} ${path}`);
    }
    await context.close();
  }
  expect(leaks).toEqual([]);
});
