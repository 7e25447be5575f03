import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';

/** Every read and write of a feature must be tried by strangers in tests/access; a new one without a test fails here. */
const features = readdirSync('features');

function filesOf(feature: string, name: 'queries' | 'changes' | 'actions'): string[] {
  const single = join('features', feature, `${name}.ts`);
  const folder = join('features', feature, name);
  return [
    ...(existsSync(single) ? [single] : []),
    ...(existsSync(folder) ? readdirSync(folder).map((file) => join(folder, file)) : []),
  ];
}

function exportedFunctions(file: string): string[] {
  const text = readFileSync(file, 'utf8');
  return [...text.matchAll(/export\s+(?:async\s+function|function|const)\s+(\w+)/g)].map((match) => match[1] as string);
}

const accessTests = readdirSync('tests/access')
  .filter((file) => file.endsWith('.test.ts'))
  .map((file) => readFileSync(join('tests/access', file), 'utf8'))
  .join('\n');

function untried(name: 'queries' | 'changes'): string[] {
  return features
    .flatMap((feature) => filesOf(feature, name))
    .flatMap((file) => exportedFunctions(file).map((one) => ({ file, one })))
    .filter(({ one }) => !new RegExp(`\\b${one}\\b`).test(accessTests))
    .map(({ file, one }) => `${file}: ${one}`);
}

describe('no read or write goes untried by strangers', () => {
  test('every query is named in tests/access', () => {
    expect(untried('queries')).toEqual([]);
  });

  test('every change is named in tests/access', () => {
    expect(untried('changes')).toEqual([]);
  });

  test('every server action asks who is there', () => {
    const open = features
      .flatMap((feature) => filesOf(feature, 'actions'))
      .flatMap((file) => {
        const text = readFileSync(file, 'utf8');
        const parts = text.split(/(?=export\s+async\s+function)/).slice(1);
        return parts
          .filter((part) => !/requireViewer|currentViewer|signedIn/.test(part))
          .map((part) => `${file}: ${/function\s+(\w+)/.exec(part)?.[1]}`);
      });
    // Signing in, resetting a password and accepting an invitation are for people who are not signed in.
    const forTheSignedOut = /signIn|askPasswordReset|requestPasswordReset|forgotPassword|resetPassword|acceptInvitation|signOut$/;
    expect(open.filter((one) => !forTheSignedOut.test(one))).toEqual([]);
  });
});
