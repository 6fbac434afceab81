import { AsyncLocalStorage } from "node:async_hooks";
import type { Client, InArgs, InStatement, ResultSet, Transaction, TransactionMode } from "@libsql/client";

/** Set while a transaction's function runs; closed with it, so that what outlives it is not held to it. */
interface OpenTransaction {
  open: boolean;
}

export interface SerialClient {
  readonly client: Client;
  /** Runs the function that works inside a transaction: until it ends, the outer database throws when used from it. */
  inside<T>(work: () => Promise<T>): Promise<T>;
}

/**
 * A client that refuses to be used from inside one of its own transactions (it would wait for itself, or read what
 * the transaction has not yet written), and whose writes, when `oneAtATime`, stand in one queue: SQLite has one
 * writer, and a second one in the same process would block the event loop while it waits.
 */
export function serialClient(client: Client, oneAtATime: boolean): SerialClient {
  const current = new AsyncLocalStorage<OpenTransaction>();
  const queue = oneAtATime ? writeQueue() : async () => () => undefined;

  const refuseInside = () => {
    if (current.getStore()?.open)
      throw new Error("The outer database is used inside a transaction; use the transaction's own executor.");
  };
  async function alone<T>(work: () => Promise<T>): Promise<T> {
    refuseInside();
    const release = await queue();
    try {
      return await work();
    } finally {
      release();
    }
  }

  const wrapped: Client = {
    async execute(statement: InStatement, args?: InArgs): Promise<ResultSet> {
      refuseInside();
      const sql = typeof statement === "string" ? statement : statement.sql;
      const run = () =>
        typeof statement === "string" ? client.execute(statement, args) : client.execute(statement);
      return isRead(sql) ? run() : alone(run);
    },
    batch: (statements, mode) => alone(() => client.batch(statements, mode)),
    migrate: (statements) => alone(() => client.migrate(statements)),
    executeMultiple: (sql) => alone(() => client.executeMultiple(sql)),
    async transaction(mode: TransactionMode = "write") {
      refuseInside();
      const release = await queue();
      try {
        return releasingTransaction(await client.transaction(mode), release);
      } catch (error) {
        release();
        throw error;
      }
    },
    sync: () => client.sync(),
    close: () => client.close(),
    reconnect: () => client.reconnect(),
    get closed() {
      return client.closed;
    },
    get protocol() {
      return client.protocol;
    },
  };

  return {
    client: wrapped,
    async inside(work) {
      const here: OpenTransaction = { open: true };
      try {
        return await current.run(here, work);
      } finally {
        here.open = false;
      }
    },
  };
}

/** Only what surely writes nothing; `with ...` may end in a write. */
const isRead = (sql: string) => /^\s*(select|explain)\b/i.test(sql);

/** First come, first served. Each call resolves with the release of its turn; releasing twice is harmless. */
function writeQueue(): () => Promise<() => void> {
  let tail = Promise.resolve();
  return () => {
    let release: () => void = () => undefined;
    const turn = tail;
    tail = new Promise((resolve) => {
      release = resolve;
    });
    return turn.then(() => release);
  };
}

/** Gives the turn back however the transaction ends. */
function releasingTransaction(transaction: Transaction, release: () => void): Transaction {
  return {
    execute: (statement: InStatement) => transaction.execute(statement),
    batch: (statements) => transaction.batch(statements),
    executeMultiple: (sql) => transaction.executeMultiple(sql),
    commit: () => transaction.commit().finally(release),
    rollback: () => transaction.rollback().finally(release),
    close() {
      try {
        transaction.close();
      } finally {
        release();
      }
    },
    get closed() {
      return transaction.closed;
    },
  };
}
