import { createHash, randomBytes } from 'node:crypto';
import { type Client, createClient, type InValue } from '@libsql/client';
import type { BrowserContext } from '@playwright/test';

/** The demo server's database, opened beside it, for finding ids and opening sessions without the sign-in form. */
const DEMO_DATABASE = 'file:build/e2e/3212.db';

let client: Client | null = null;

/** Rows of a query on the demo database. */
export async function demoRows(sql: string, args: InValue[] = []): Promise<Record<string, string>[]> {
  client ??= createClient({ url: DEMO_DATABASE, timeout: 10_000 });
  const result = await client.execute({ sql, args });
  return result.rows.map((row) => Object.fromEntries(result.columns.map((column) => [column, String(row[column])])));
}

/** The first value of a query; fails the test when there is none. */
export async function demoValue(sql: string, args: InValue[] = []): Promise<string> {
  const [row] = await demoRows(sql, args);
  const value = row && Object.values(row)[0];
  if (value === undefined) throw new Error(`The demo scenario has no row for: ${sql}`);
  return value;
}

export interface DemoPerson {
  id: string;
  email: string;
  role: string;
}

/** The first person of a role, or the one with that e-mail. */
export async function demoPerson(roleOrEmail: string): Promise<DemoPerson> {
  const [row] = await demoRows('select id, email, role from person where role = ?1 or email = ?1 order by email limit 1', [
    roleOrEmail,
  ]);
  if (!row) throw new Error(`The demo scenario has no ${roleOrEmail}.`);
  return row as unknown as DemoPerson;
}

/** A cookie that signs a person in: the secret in the cookie, its hash in the database, as the product does it. */
export async function sessionCookie(personId: string): Promise<string> {
  const secret = randomBytes(25).toString('hex').slice(0, 40);
  await demoRows('insert into session (id, user_id, expires_at) values (?1, ?2, ?3)', [
    createHash('sha256').update(secret).digest('hex'),
    personId,
    Math.floor(Date.now() / 1000) + 86_400 * 20,
  ]);
  return secret;
}

/** Signs a browser context in as the first person of a role (or an e-mail). */
export async function signInAs(context: BrowserContext, baseURL: string, roleOrEmail: string): Promise<DemoPerson> {
  const person = await demoPerson(roleOrEmail);
  await context.addCookies([
    { name: 'hilum_session', value: await sessionCookie(person.id), url: baseURL, httpOnly: true, sameSite: 'Lax' },
  ]);
  return person;
}
