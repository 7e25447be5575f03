import type { AddressInfo } from 'node:net';
import { eq } from 'drizzle-orm';
import { SMTPServer } from 'smtp-server';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';

/** A mail server of our own: keeps what it gets, and fails as each test wants. */
const received: { to: string[]; raw: string }[] = [];
let behave: 'good' | 'busy' | 'no such mailbox' = 'good';
const server = new SMTPServer({
  authOptional: true,
  disabledCommands: ['STARTTLS'],
  onRcptTo(_address, _session, callback) {
    if (behave === 'no such mailbox') return callback(Object.assign(new Error('No such mailbox'), { responseCode: 550 }));
    if (behave === 'busy') return callback(Object.assign(new Error('Try again later'), { responseCode: 451 }));
    callback();
  },
  onData(stream, session, callback) {
    const parts: Buffer[] = [];
    stream.on('data', (part: Buffer) => parts.push(part));
    stream.on('end', () => {
      received.push({
        to: session.envelope.rcptTo.map((one) => one.address),
        raw: Buffer.concat(parts).toString('utf8'),
      });
      callback();
    });
  },
});

async function modules() {
  const [{ database }, { outboxMails }, { queueMail }, { sendDueMails }] = await Promise.all([
    import('@/db/client'),
    import('@/db/schema'),
    import('@/lib/mail/outbox'),
    import('@/lib/mail/sender'),
  ]);
  return { database, outboxMails, queueMail, sendDueMails };
}

let kit: Awaited<ReturnType<typeof modules>>;

beforeAll(async () => {
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  // Set before the configuration is first read.
  process.env.SMTP_URL = `smtp://127.0.0.1:${(server.server.address() as AddressInfo).port}`;
  kit = await modules();
});

afterAll(() => new Promise<void>((resolve) => server.close(() => resolve())));

beforeEach(async () => {
  received.length = 0;
  behave = 'good';
  await kit.database().delete(kit.outboxMails);
});

async function queue(key: string, to = 'lena@tealcreek.example'): Promise<void> {
  const mail = { dealershipId: null, to, subject: 'Your plan – 2027', text: 'Agreed.', html: '<p>Agreed.</p>', dedupeKey: key };
  await kit.database().transaction((transaction) => kit.queueMail(transaction, mail), { behavior: 'immediate' });
}

const mails = () => kit.database().select().from(kit.outboxMails);
/** Later than any mail was queued on a machine whose clock steps. */
const NOW = Date.now() + 60_000;

describe('the outbox', () => {
  test('sends a mail with both parts to the person it is for, and knows that it did', async () => {
    await queue('a');
    expect(await kit.sendDueMails(NOW)).toBe(1);
    expect(received.map((one) => one.to)).toEqual([['lena@tealcreek.example']]);
    expect(received[0]?.raw).toContain('text/plain');
    expect(received[0]?.raw).toContain('text/html');
    expect(received[0]?.raw).toMatch(/^From: .*Hilum/m);
    expect((await mails())[0]).toMatchObject({ state: 'sent', attempts: 1, sentAt: NOW, lastError: null });
  });

  test('sends nothing for a write that was undone', async () => {
    const mail = { dealershipId: null, to: 'x@y.example', subject: 's', text: 't', html: 'h', dedupeKey: 'undone' };
    await expect(
      kit.database().transaction(
        async (transaction) => {
          await kit.queueMail(transaction, mail);
          throw new Error('undo');
        },
        { behavior: 'immediate' },
      ),
    ).rejects.toThrow('undo');
    expect(await kit.sendDueMails(NOW)).toBe(0);
    expect(received).toEqual([]);
  });

  test('sends the same mail once, however often it is queued', async () => {
    await queue('same');
    await queue('same');
    await kit.sendDueMails(NOW);
    await queue('same');
    await kit.sendDueMails(NOW);
    expect(received.length).toBe(1);
  });

  test('sends each of forty mails once when five senders work at the same time', async () => {
    for (let n = 0; n < 40; n += 1) await queue(`many-${n}`, `p${n}@farm.example`);
    const taken = await Promise.all(Array.from({ length: 5 }, () => kit.sendDueMails(NOW)));
    expect(taken.reduce((sum, one) => sum + one, 0)).toBe(40);
    expect(new Set(received.map((one) => one.to[0])).size).toBe(40);
    expect(received.length).toBe(40);
  });

  test('tries again later when the mail server is busy, and not before', async () => {
    await queue('busy');
    behave = 'busy';
    await kit.sendDueMails(NOW);
    const [mail] = await mails();
    expect(mail).toMatchObject({ state: 'queued', attempts: 1, nextAttemptAt: NOW + 60_000 });
    expect(mail?.lastError).toContain('Try again later');
    behave = 'good';
    expect(await kit.sendDueMails(NOW + 59_000)).toBe(0);
    expect(await kit.sendDueMails(NOW + 60_000)).toBe(1);
    expect((await mails())[0]?.state).toBe('sent');
    expect(received.length).toBe(1);
  });

  test('gives up after ten tries and says why', async () => {
    await queue('ten');
    behave = 'busy';
    for (let n = 0; n < 12; n += 1) await kit.sendDueMails(NOW + n * 7 * 3_600_000);
    expect((await mails())[0]).toMatchObject({ state: 'failed', attempts: 10 });
  });

  test('gives up at once on a mailbox that does not exist', async () => {
    await queue('nobody');
    behave = 'no such mailbox';
    await kit.sendDueMails(NOW);
    const [mail] = await mails();
    expect(mail).toMatchObject({ state: 'failed', attempts: 1 });
    expect(mail?.lastError).toContain('No such mailbox');
  });

  test('does not send by itself what a stopped server may have sent already', async () => {
    await queue('stopped');
    await kit
      .database()
      .update(kit.outboxMails)
      .set({ state: 'sending', nextAttemptAt: NOW - 1 })
      .where(eq(kit.outboxMails.dedupeKey, 'stopped'));
    expect(await kit.sendDueMails(NOW)).toBe(0);
    const [mail] = await mails();
    expect(mail?.state).toBe('failed');
    expect(mail?.lastError).toContain('It may have arrived.');
    expect(received).toEqual([]);
  });

  test('leaves a mail alone that another server has in hand', async () => {
    await queue('in-hand');
    await kit
      .database()
      .update(kit.outboxMails)
      .set({ state: 'sending', nextAttemptAt: NOW + 60_000 })
      .where(eq(kit.outboxMails.dedupeKey, 'in-hand'));
    await kit.sendDueMails(NOW);
    expect((await mails())[0]?.state).toBe('sending');
  });
});
