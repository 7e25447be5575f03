import { describe, expect, test } from 'vitest';
import type { Viewer } from '@/features/accounts/model';
import { withViewer } from '@/features/accounts/route';
import { bad, good, NotAllowedError, NotFoundError } from '@/lib/errors';
import { isSameOrigin, jsonOutcome } from '@/lib/http';

const ADDRESS = 'http://127.0.0.1:3000/api/v1/thing';
const viewer = { personId: 'p', role: 'rep' } as Viewer;

function post(headers: Record<string, string>): Request {
  return new Request(ADDRESS, { method: 'POST', headers: { host: '127.0.0.1:3000', ...headers } });
}

describe('where a write came from', () => {
  test.each([
    ['our own page', { origin: 'http://127.0.0.1:3000', 'sec-fetch-site': 'same-origin' }, true],
    ['a script that is no browser', {}, true],
    ['another site', { origin: 'https://evil.example' }, false],
    ['another site of the same registrable name', { 'sec-fetch-site': 'same-site' }, false],
    ['another site that hides its origin', { 'sec-fetch-site': 'cross-site' }, false],
    ['a sandboxed frame', { origin: 'null' }, false],
    ['another port', { origin: 'http://127.0.0.1:4000' }, false],
  ])('%s', (_name, headers, same) => {
    expect(isSameOrigin(post(headers as Record<string, string>))).toBe(same);
  });
});

describe('a route handler for signed-in people', () => {
  const route = (work: () => Promise<Response>, who: Viewer | null = viewer) => withViewer(work, async () => who);
  const get = new Request(ADDRESS);

  test('answers 401 to a stranger without running', async () => {
    let ran = false;
    const response = await route(async () => {
      ran = true;
      return Response.json({});
    }, null)(get, {});
    expect([response.status, ran]).toEqual([401, false]);
  });

  test('answers 403 to a write from another site without running', async () => {
    const response = await route(async () => Response.json({}))(post({ origin: 'https://evil.example' }), {});
    expect(response.status).toBe(403);
  });

  test('maps what is missing to 404 and what is not allowed to 403, in words', async () => {
    const missing = await route(() => Promise.reject(new NotFoundError('No such field.')))(get, {});
    expect([missing.status, await missing.json()]).toEqual([404, { ok: false, problems: [{ message: 'No such field.' }] }]);
    const refused = await route(() => Promise.reject(new NotAllowedError('Only a manager.')))(get, {});
    expect(refused.status).toBe(403);
  });

  test('lets a bug through to the log', async () => {
    await expect(route(() => Promise.reject(new TypeError('bug')))(get, {})).rejects.toThrow('bug');
  });
});

test('an outcome is 200 with its value or 422 with its problems, and never cached', async () => {
  expect(jsonOutcome(good(1)).status).toBe(200);
  const failed = jsonOutcome(bad('Too long.', 'name'));
  expect([failed.status, await failed.json()]).toEqual([422, { ok: false, problems: [{ message: 'Too long.', path: 'name' }] }]);
  expect(failed.headers.get('cache-control')).toBe('no-store');
});
