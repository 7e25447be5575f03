import 'server-only';
import { type Algorithm, hash, verify } from '@node-rs/argon2';

/** Argon2id with the parameters OWASP's password storage sheet gives first: 19 MiB, 2 passes, 1 lane. */
const PARAMETERS = { algorithm: 2 satisfies Algorithm.Argon2id as number, memoryCost: 19_456, timeCost: 2, parallelism: 1 };

/** A hash of random bytes nobody knows, so that an unknown e-mail takes as long as a wrong password. */
let decoy: Promise<string> | null = null;

/** Argon2id hash of a password, in the standard encoded form. */
export function hashPassword(password: string): Promise<string> {
  return hash(password, PARAMETERS);
}

/** Does the password fit the hash? `null` (no such person) takes the same time and is false. */
export async function passwordFits(storedHash: string | null, password: string): Promise<boolean> {
  decoy ??= hashPassword(crypto.randomUUID());
  const fits = await verify(storedHash ?? (await decoy), password).catch(() => false);
  return storedHash !== null && fits;
}
