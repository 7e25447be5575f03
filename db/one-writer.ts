import type { Client, InStatement, Transaction, TransactionMode } from '@libsql/client';

/**
 * SQLite takes one writer at a time, and its driver waits for its turn by blocking the whole process: two write
 * transactions of the same process would wait for each other until the busy timeout. So writes of one process queue here,
 * without blocking; writers of other processes are waited for by the busy timeout as usual. Reads never queue.
 *
 * A write made outside the transaction while that transaction is open would wait for itself: it fails after `patience`.
 */
export function oneWriterAtATime(client: Client, patienceMilliseconds = 30_000): Client {
  let last: Promise<void> = Promise.resolve();

  /** Waits for the turn; the answer ends it. */
  async function turn(): Promise<() => void> {
    const before = last;
    let end: () => void = () => undefined;
    last = new Promise((resolve) => {
      end = resolve;
    });
    let timer: NodeJS.Timeout | undefined;
    const late = new Promise<never>((_resolve, reject) => {
      timer = setTimeout(() => {
        // The place in the queue is given up only when the one before has ended, so that order holds.
        before.then(end);
        reject(new Error(`A write waited ${patienceMilliseconds / 1000} s for another write of this process.`));
      }, patienceMilliseconds);
    });
    try {
      await Promise.race([before, late]);
    } finally {
      clearTimeout(timer);
    }
    return end;
  }

  async function inTurn<Value>(work: () => Promise<Value>): Promise<Value> {
    const end = await turn();
    try {
      return await work();
    } finally {
      end();
    }
  }

  async function transaction(mode: TransactionMode = 'write'): Promise<Transaction> {
    if (mode === 'read') return client.transaction(mode);
    const end = await turn();
    try {
      return endingTurn(await client.transaction(mode), end);
    } catch (error) {
      end();
      throw error;
    }
  }

  return new Proxy(client, {
    get(target, name) {
      if (name === 'transaction') return transaction;
      const member = Reflect.get(target, name, target);
      if (typeof member !== 'function') return member;
      if (name === 'execute') {
        return (...given: [InStatement]) => {
          const run = () => (member as (...all: unknown[]) => ReturnType<Client['execute']>).apply(target, given);
          return isRead(given[0]) ? run() : inTurn(run);
        };
      }
      if (name === 'batch' || name === 'migrate' || name === 'executeMultiple') {
        return (...given: unknown[]) => inTurn(() => member.apply(target, given));
      }
      return member.bind(target);
    },
  });
}

function isRead(statement: InStatement): boolean {
  const text = typeof statement === 'string' ? statement : statement.sql;
  if (/^\s*(select|pragma|explain|values)\b/i.test(text)) return true;
  return /^\s*with\b/i.test(text) && !/\b(insert|update|delete|replace)\b/i.test(text);
}

/** The same transaction, ending the writer's turn when it is over, however it ends. */
function endingTurn(transaction: Transaction, end: () => void): Transaction {
  return new Proxy(transaction, {
    get(target, name) {
      const member = Reflect.get(target, name, target);
      if (typeof member !== 'function') return member;
      if (name === 'commit' || name === 'rollback') {
        return async () => {
          try {
            return await member.call(target);
          } finally {
            end();
          }
        };
      }
      if (name === 'close') {
        return () => {
          try {
            return member.call(target);
          } finally {
            end();
          }
        };
      }
      return member.bind(target);
    },
  });
}
