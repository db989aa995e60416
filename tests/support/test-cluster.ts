import { Client, DatabaseError } from 'pg';
import { startThrowawayCluster } from '../../scripts/lib/cluster.mjs';

/** A private server for one run of tests, with one migrated database that every test file copies. */
export interface TestCluster {
  /** Address of any database on it. */
  url: (database: string) => string;
  stop: () => Promise<void>;
}

export interface Database {
  url: string;
  drop: () => Promise<void>;
}

/** Starts the server and hands the address of an empty database named `template` to `prepare`, once. */
export async function startTestCluster(
  prepare: (templateUrl: string) => Promise<void>,
): Promise<TestCluster> {
  const cluster = await startThrowawayCluster();
  try {
    await inDatabase(cluster.url('mereward'), (client) => client.query('CREATE DATABASE template'));
    await prepare(cluster.url('template'));
  } catch (error) {
    await cluster.stop();
    throw error;
  }
  return { url: cluster.url, stop: cluster.stop };
}

async function inDatabase<T>(url: string, work: (client: Client) => Promise<T>): Promise<T> {
  const client = new Client({ connectionString: url });
  await client.connect();
  try {
    return await work(client);
  } finally {
    await client.end();
  }
}

/** The server's own vacuuming is at work there: nobody may end it by force, a plain drop sends it away by itself. */
const NOT_PRIVILEGED = '42501';

let copies = 0;

/** Copies a template database that nobody is connected to. `clusterUrl` is any database of the same server. */
export async function copyDatabase(clusterUrl: string, template: string): Promise<Database> {
  copies += 1;
  const name = `copy_${process.pid}_${copies}`;
  await inDatabase(clusterUrl, (client) => client.query(`CREATE DATABASE ${name} TEMPLATE ${template}`));
  const address = new URL(clusterUrl);
  address.pathname = `/${name}`;
  return {
    url: address.href,
    drop: async () => {
      await inDatabase(clusterUrl, (client) =>
        client.query(`DROP DATABASE IF EXISTS ${name} WITH (FORCE)`).catch((fault: unknown) => {
          if (!(fault instanceof DatabaseError) || fault.code !== NOT_PRIVILEGED) throw fault;
          return client.query(`DROP DATABASE IF EXISTS ${name}`);
        }),
      );
    },
  };
}
