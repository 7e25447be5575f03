import { createHash, randomBytes } from 'node:crypto';

/** A random identifier of 120 bits, url-safe lower-case. */
export function createId(): string {
  return randomBytes(15).toString('base64url').replace(/[-_]/g, 'x').toLowerCase();
}

/** A secret for links and cookies, 192 bits, url-safe. Store only its hash. */
export function createToken(): string {
  return randomBytes(24).toString('base64url');
}

/** SHA-256 as hex: what is stored in place of a secret, and how originals are named. */
export function sha256(value: string | Uint8Array): string {
  return createHash('sha256').update(value).digest('hex');
}
