/** Makes a manager: npm run create-manager -- --dealership NAME --name NAME --email ADDRESS --password WORDS */
import { createInterface } from 'node:readline/promises';
import { Writable } from 'node:stream';
import { parseArgs } from 'node:util';
import { migrateDatabase } from '@/db/migrate';
import { createManager } from '@/features/accounts/create-manager';

const { values } = parseArgs({
  options: { dealership: { type: 'string' }, name: { type: 'string' }, email: { type: 'string' }, password: { type: 'string' } },
});

/** Swallows what a person types, so that a password does not stand on the screen. */
const unseen = new Writable({ write: (_typed, _encoding, done) => done() });

async function ask(given: string | undefined, question: string, hidden = false): Promise<string> {
  if (given !== undefined) return given;
  if (!process.stdin.isTTY) {
    console.error(
      `Missing: ${question}. Usage: npm run create-manager -- --dealership NAME --name NAME --email ADDRESS --password WORDS`,
    );
    process.exit(2);
  }
  if (hidden) process.stdout.write(`${question}: `);
  const prompt = createInterface({ input: process.stdin, output: hidden ? unseen : process.stdout, terminal: true });
  const answer = await prompt.question(`${question}: `);
  prompt.close();
  if (hidden) process.stdout.write('\n');
  return answer;
}

const input = {
  dealershipName: await ask(values.dealership, 'Name of the dealership'),
  name: await ask(values.name, 'Your name'),
  email: await ask(values.email, 'E-mail'),
  password: await ask(values.password, 'Password (at least 10 characters, not shown)', true),
};
await migrateDatabase();
const outcome = await createManager(input);
if (!outcome.ok) {
  for (const problem of outcome.problems) console.error(problem.path ? `${problem.path}: ${problem.message}` : problem.message);
  process.exit(2);
}
console.log(`${input.name} is a manager of ${input.dealershipName} and can sign in.`);
