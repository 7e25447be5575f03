import { describe, expect, test, vi } from 'vitest';

/** Nobody is signed in: no cookie at all. */
vi.mock('next/headers', () => ({
  cookies: async () => ({ get: () => undefined, set: () => undefined }),
  headers: async () => new Headers(),
}));

class Redirected extends Error {
  constructor(readonly to: string) {
    super(`redirected to ${to}`);
  }
}
vi.mock('next/navigation', () => ({
  redirect: (to: string) => {
    throw new Redirected(to);
  },
  notFound: () => {
    throw new Error('not found');
  },
}));
vi.mock('next/cache', () => ({ revalidatePath: () => undefined, revalidateTag: () => undefined }));

const modules = import.meta.glob<Record<string, unknown>>('../../features/*/actions.ts');

/** For people who are not signed in yet, by password or by a link’s secret. */
const FOR_THE_SIGNED_OUT = ['signIn', 'signOut', 'askPasswordReset', 'resetPassword', 'acceptInvitation'];

describe('every server action, called by somebody who is not signed in', () => {
  test('there are actions to try', () => {
    expect(Object.keys(modules).length).toBeGreaterThanOrEqual(2);
  });

  test.each(Object.keys(modules))('%s sends them to sign in', async (path) => {
    const actions = await (modules[path] as () => Promise<Record<string, unknown>>)();
    for (const [name, action] of Object.entries(actions)) {
      if (typeof action !== 'function' || FOR_THE_SIGNED_OUT.includes(name)) continue;
      const answer = await Promise.resolve()
        .then(() => action('', new FormData(), new FormData(), new FormData()))
        .then(
          (value) => ({ value }),
          (error: unknown) => ({ error }),
        );
      const where = 'error' in answer && answer.error instanceof Redirected ? answer.error.to : answer;
      expect({ name, where }).toEqual({ name, where: '/sign-in' });
    }
  });
});

const routes = import.meta.glob<Record<string, unknown>>('../../app/api/**/route.ts');

/** The crew’s planting sheet: its address carries the secret. */
const FOR_THE_CREW = /\/api\/v1\/sheet\//;
const METHODS = ['GET', 'POST', 'PUT', 'PATCH', 'DELETE'];

describe('every route, asked by somebody who is not signed in', () => {
  test('there are routes to try', () => {
    expect(Object.keys(routes).length).toBeGreaterThanOrEqual(3);
  });

  test.each(Object.keys(routes).filter((path) => !FOR_THE_CREW.test(path)))('%s answers 401', async (path) => {
    const handlers = await (routes[path] as () => Promise<Record<string, unknown>>)();
    const params = new Proxy({}, { get: (_target, name) => (name === 'season' ? '2027' : 'guessed') });
    for (const method of METHODS) {
      const handler = handlers[method];
      if (typeof handler !== 'function') continue;
      const request = new Request('http://127.0.0.1:3000/api', { method, headers: { host: '127.0.0.1:3000' } });
      const response = await handler(request, { params: Promise.resolve(params) });
      expect({ method, status: response.status }).toEqual({ method, status: 401 });
    }
  });
});
