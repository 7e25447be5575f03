import { readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from '@playwright/test';
import { demoValue, signInAs } from './support/demo';

/** Every route of the JSON API, on the demo scenario, with who may have it. */
async function routes(): Promise<{ method: 'get' | 'post'; path: string; route: string; allowed: string[] }[]> {
  const operationId = await demoValue("select id from operation where name = 'Teal Creek Farms'");
  const fieldId = await demoValue('select id from field where operation_id = ?1 limit 1', [operationId]);
  const uploadId = await demoValue('select id from upload limit 1');
  const teal = ['grower@tealcreek.example', 'rep@otterprairie.example', 'manager@otterprairie.example'];
  const lone = ['grower@lonetree.example', 'rep@otterprairie.example', 'manager@otterprairie.example'];
  const reps = ['rep@otterprairie.example', 'rep2@otterprairie.example', 'manager@otterprairie.example'];
  const everyone = [...new Set([...teal, ...lone, ...reps, 'grower@bergan.example'])];
  return [
    { method: 'get', route: 'fields', path: `/api/v1/fields?operation=${operationId}`, allowed: teal },
    { method: 'get', route: 'fields/[fieldId]/picks', path: `/api/v1/fields/${fieldId}/picks`, allowed: teal },
    { method: 'get', route: 'line-up', path: '/api/v1/line-up', allowed: everyone },
    { method: 'get', route: 'operations', path: '/api/v1/operations', allowed: everyone },
    { method: 'get', route: 'plans/[operationId]/[season]', path: `/api/v1/plans/${operationId}/2027`, allowed: teal },
    {
      method: 'get',
      route: 'plans/[operationId]/[season]/export',
      path: `/api/v1/plans/${operationId}/2027/export?format=csv`,
      allowed: teal,
    },
    { method: 'post', route: 'plans/[operationId]/[season]/solve', path: `/api/v1/plans/${operationId}/2027/solve`, allowed: [] },
    { method: 'get', route: 'season/export', path: '/api/v1/season/export', allowed: reps },
    { method: 'post', route: 'sheet/[token]/planted', path: '/api/v1/sheet/no-such-link/planted', allowed: [] },
    { method: 'get', route: 'uploads/[uploadId]/file/[ordinal]', path: `/api/v1/uploads/${uploadId}/file/0`, allowed: lone },
    { method: 'post', route: 'uploads', path: `/api/v1/uploads?kind=boundaries&operation=${operationId}`, allowed: [] },
  ];
}

function routeFiles(folder: string): string[] {
  return readdirSync(folder).flatMap((name) => {
    const path = join(folder, name);
    if (statSync(path).isDirectory()) return routeFiles(path);
    return name === 'route.ts' ? [folder.replace('app/api/v1/', '')] : [];
  });
}

test('every route of the JSON API is tried here', async () => {
  const known = (await routes()).map((one) => one.route);
  expect(routeFiles('app/api/v1').filter((route) => !known.includes(route))).toEqual([]);
});

test('nobody gets anything signed out', async ({ request }) => {
  for (const { method, path } of await routes()) {
    const response = await request[method](path);
    expect([400, 401, 403, 404, 410], `${path}: ${response.status()}`).toContain(response.status());
  }
});

test('each route answers those it is for, and no other account', async ({ browser, baseURL }) => {
  test.setTimeout(180_000);
  const wrong: string[] = [];
  const all = await routes();
  for (const email of [
    'grower@tealcreek.example',
    'grower@bergan.example',
    'grower@lonetree.example',
    'rep@otterprairie.example',
    'rep2@otterprairie.example',
    'manager@otterprairie.example',
  ]) {
    const context = await browser.newContext({ baseURL });
    await signInAs(context, baseURL as string, email);
    for (const { method, path, allowed } of all) {
      if (method === 'post') continue;
      const status = (await context.request.get(path)).status();
      const open = status === 200;
      if (open !== allowed.includes(email)) wrong.push(`${email} ${path}: ${status}`);
    }
    await context.close();
  }
  expect(wrong).toEqual([]);
});

test('a write from another site is refused, whoever is signed in', async ({ browser, baseURL }) => {
  const context = await browser.newContext({ baseURL });
  await signInAs(context, baseURL as string, 'grower@tealcreek.example');
  for (const { method, path } of await routes()) {
    if (method === 'get' || path.includes('/sheet/')) continue;
    const response = await context.request.post(path, {
      headers: { origin: 'https://elsewhere.example' },
      multipart: { file: { name: 'x.zip', mimeType: 'application/zip', buffer: Buffer.from('x') } },
    });
    expect(response.status(), path).toBe(403);
  }
  await context.close();
});

test('growers get neither units nor prices from any route', async ({ browser, baseURL }) => {
  const context = await browser.newContext({ baseURL });
  await signInAs(context, baseURL as string, 'grower@tealcreek.example');
  for (const { method, path, allowed } of await routes()) {
    if (method === 'post' || !allowed.includes('grower@tealcreek.example')) continue;
    const text = await (await context.request.get(path)).text();
    expect(text, path).not.toMatch(/"(unitsOnHand|priceCentsPerUnit)":\s*[1-9]/);
  }
  await context.close();
});

test('a body that is not what it says, and a kind that is not known, get a sentence', async ({ browser, baseURL }) => {
  const context = await browser.newContext({ baseURL });
  await signInAs(context, baseURL as string, 'grower@tealcreek.example');
  const operationId = await demoValue("select id from operation where name = 'Teal Creek Farms'");
  const unknown = await context.request.post('/api/v1/uploads?kind=nonsense', {
    multipart: { file: { name: 'x.zip', mimeType: 'application/zip', buffer: Buffer.from('x') } },
  });
  expect([unknown.status(), (await unknown.json()).problems[0].message]).toEqual([
    400,
    expect.stringContaining('Say what is brought in'),
  ]);
  const plain = await context.request.post(`/api/v1/uploads?kind=boundaries&operation=${operationId}`, {
    data: 'not a form',
    headers: { 'content-type': 'text/plain' },
  });
  expect(plain.status()).toBe(415);
  const empty = await context.request.post(`/api/v1/uploads?kind=boundaries&operation=${operationId}`, {
    multipart: { file: { name: 'x.zip', mimeType: 'application/zip', buffer: Buffer.alloc(0) } },
  });
  expect((await empty.json()).problems[0].message).toContain('empty');
  const broken = await context.request.post(`/api/v1/uploads?kind=boundaries&operation=${operationId}`, {
    data: 'no boundary here',
    headers: { 'content-type': 'multipart/form-data; boundary=x' },
  });
  expect([broken.status(), (await broken.json()).ok]).toEqual([422, false]);
  await context.close();
});
