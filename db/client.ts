import { drizzle, type NodePgDatabase } from "drizzle-orm/node-postgres";
import pg from "pg";
import * as schema from "./schema";

export type Database = NodePgDatabase<typeof schema> & { $client: pg.Pool };

const urlVariables = { app: "DATABASE_URL_APP", auth: "DATABASE_URL_AUTH" } as const;
type Account = keyof typeof urlVariables;

declare global {
  // Kept on the global object: the development server re-evaluates modules, and each would open pools of its own.
  var saddlemarkPools: Partial<Record<Account, Database>> | undefined;
}

const pools = (globalThis.saddlemarkPools ??= {});

/** Team data, as the role that row-level security binds. Query through `withTeam` only. */
export function appDatabase(): Database {
  return (pools.app ??= openDatabase("app"));
}

/** Accounts, sessions and memberships, as better-auth's role. */
export function authDatabase(): Database {
  return (pools.auth ??= openDatabase("auth"));
}

/** Closes both pools; for the worker's end and for tests. */
export async function closeDatabases(): Promise<void> {
  const open = [pools.app, pools.auth].filter((database) => database !== undefined);
  delete pools.app;
  delete pools.auth;
  await Promise.all(open.map((database) => database.$client.end()));
}

/** Gives up on a server that does not answer after ten seconds, however long one may wait for a free connection. */
class PromptClient extends pg.Client {
  constructor(config?: string | pg.ClientConfig) {
    super(typeof config === "object" ? { ...config, connectionTimeoutMillis: 10_000 } : config);
  }
}

function openDatabase(account: Account): Database {
  const variable = urlVariables[account];
  const connectionString = process.env[variable];
  if (!connectionString) throw new Error(`${variable} is not set.`);
  const pool = new pg.Pool({
    connectionString,
    max: 10,
    idleTimeoutMillis: 30_000,
    // The pool's own limit counts waiting for a free connection too: a burst of thousands of reports waits its turn.
    connectionTimeoutMillis: 120_000,
    Client: PromptClient,
    application_name: `saddlemark-${account}`,
  });
  // An idle connection breaks when the server restarts; the pool replaces it. Without a listener the process would end.
  pool.on("error", () => undefined);
  // The same for a connection that is lent out but not asking anything just then; its next statement fails and says so.
  pool.on("connect", (client) => client.on("error", () => undefined));
  return drizzle(pool, { schema });
}
