import { existsSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { AUDIT_KINDS, beginningsOf, cursorOf, readCursor } from '@/features/accounts/audit';
import { operationInAddress } from '@/features/accounts/components/top-bar';
import { waitSeconds } from '@/features/accounts/lock-out';
import { passwordProblem } from '@/features/accounts/password-rules';
import { PLACES, settingsOf, startOf } from '@/features/accounts/places';
import { inviteSchema, signInSchema } from '@/features/accounts/schemas';

describe('a password', () => {
  test.each([
    ['short', 'at least 10 characters'],
    ['aaaaaaaaaaaa', 'at least 5 different'],
    ['Soybeans-2027!', 'first passwords'],
    ['password1234', 'first passwords'],
    ['0123456789', 'first passwords'],
    ['x'.repeat(201), 'at most 200'],
  ])('%s is refused in words', (password, words) => {
    expect(passwordProblem(password)).toContain(words);
  });

  test('of a few unrelated words is good', () => {
    expect(passwordProblem('gate barn wrench creek')).toBeNull();
    expect(passwordProblem('teal-creek-2027', 'grower@tealcreek.example')).toBeNull();
  });

  test('is not the e-mail, nor nearly', () => {
    expect(passwordProblem('lena.aldous@farm.example', 'lena.aldous@farm.example')).toContain('e-mail');
    expect(passwordProblem('Lena.Aldous1', 'lena.aldous@farm.example')).toContain('e-mail');
    expect(passwordProblem('lena.aldous and her barn', 'lena.aldous@farm.example')).toBeNull();
  });

  test('never breaks the rules, whatever is typed', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'grapheme', maxLength: 250 }), (typed) => {
        const problem = passwordProblem(typed, 'a@b.example');
        expect(problem === null || problem.length > 10).toBe(true);
      }),
    );
  });
});

describe('waiting after failed tries', () => {
  test('starts after 5 from one place, doubles, and ends at 15 minutes', () => {
    expect([4, 5, 6, 7, 40].map((failures) => waitSeconds(failures, 'pair'))).toEqual([0, 1, 2, 4, 900]);
  });

  test('of strangers from everywhere costs an owner at a new browser a minute at most', () => {
    expect(waitSeconds(10_000, 'email')).toBe(60);
  });

  test('never gets shorter with more failures', () => {
    fc.assert(
      fc.property(fc.nat(2000), fc.constantFrom('pair', 'address', 'email', 'browser'), (failures, counted) => {
        expect(waitSeconds(failures + 1, counted)).toBeGreaterThanOrEqual(waitSeconds(failures, counted));
      }),
    );
  });
});

describe('what people write', () => {
  test('an e-mail is trimmed and lower case', () => {
    expect(signInSchema.parse({ email: ' Lena@Farm.Example ', password: 'x' }).email).toBe('lena@farm.example');
  });

  test('a grower is invited to an operation', () => {
    const without = inviteSchema.safeParse({ email: 'a@b.example', name: 'Ann', role: 'grower' });
    expect(without.error?.issues[0]?.message).toBe('Choose the operation this grower belongs to.');
    expect(inviteSchema.safeParse({ email: 'a@b.example', name: 'Ann', role: 'rep' }).success).toBe(true);
  });
});

describe('places', () => {
  test('growers see neither other growers nor the season, and start at their fields', () => {
    const seen = PLACES.filter((place) => place.roles.includes('grower')).map((place) => place.label);
    expect(seen).toEqual(['Fields', 'Line-up', 'Plans']);
    expect(startOf('grower')).toBe('/fields');
  });

  test('only a manager has the audit trail and the outbox in the menu', () => {
    expect(settingsOf('rep', true).map((one) => one.label)).toEqual(['People', 'My account']);
    expect(settingsOf('grower', true).map((one) => one.label)).toEqual(['My account']);
    expect(settingsOf('manager', true).map((one) => one.href)).toContain('/outbox');
    expect(settingsOf('manager', false).map((one) => one.href)).not.toContain('/outbox');
  });

  test('each leads to a page, and every page of the settings is in the menu', () => {
    const pageOf = (href: string) => join('app', '(work)', href, 'page.tsx');
    const listed = [...PLACES, ...settingsOf('manager', true)].map((one) => one.href);
    expect(listed.filter((href) => !existsSync(pageOf(href)))).toEqual([]);
    const settings = readdirSync('app/(work)/settings').filter((name) => existsSync(pageOf(`/settings/${name}`)));
    expect(settings.filter((name) => !listed.includes(`/settings/${name}`))).toEqual([]);
  });

  test('the bar knows the operation an address is about', () => {
    expect(operationInAddress('/fields', 'abc')).toBe('abc');
    expect(operationInAddress('/plans/abc/2027', null)).toBe('abc');
    expect(operationInAddress('/growers/abc', null)).toBe('abc');
    expect(operationInAddress('/line-up', null)).toBeNull();
  });
});

describe('the audit trail in an address', () => {
  test('a cursor comes back as it was', () => {
    expect(readCursor(cursorOf({ at: 1_766_577_000_123, id: 'abc9' }))).toEqual({ at: 1_766_577_000_123, id: 'abc9' });
  });

  test('a cursor that is none begins at the newest', () => {
    for (const text of [undefined, '', 'abc', '1_', "1_a' or 1=1"]) expect(readCursor(text)).toBeUndefined();
  });

  test('each kind filters something, an unknown one nothing', () => {
    for (const kind of AUDIT_KINDS) expect(beginningsOf(kind.value).length).toBeGreaterThan(0);
    expect(beginningsOf('no such kind')).toEqual([]);
  });
});
