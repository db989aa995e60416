import { makeApp } from '@mereward/api/app';
import { readConfig } from '@mereward/api/config';
import { makeLogger } from '@mereward/api/http/logging';
import { LakeView } from '@mereward/shared/lakes/contract';
import { FisheryList } from '@mereward/shared/fisheries/contract';
import { makeDataSource } from '@mereward/db/data-source';
import { once } from 'node:events';
import { Agent, createServer, request } from 'node:http';
import pg from 'pg';
import { benchLine } from './bench-line';
import type { DemoSite } from './demo-site';
import { portOf } from './hello-page';
import { median } from './median';

const ROUNDS = 5;
const REQUESTS = 40;
const START_GOAL_MS = 5000;

type Statement = { text: string; values: unknown[] };

/** Remembers what is asked of the database, to ask the same again without the program. */
class Recorder {
  statements: Statement[] | null = null;
  logQuery(text: string, values: unknown[] = []) {
    this.statements?.push({ text, values });
  }
  logQueryError() {}
  logQuerySlow() {}
  logSchemaBuild() {}
  logMigration() {}
  log() {}
}

type Program = { recorder: Recorder; get: (path: string) => Promise<string>; stop: () => Promise<void> };

/** The program in this process on a database that holds the demo, so that its statements can be seen. */
async function openProgram(databaseUrl: string): Promise<Program> {
  const config = readConfig({ DATABASE_URL: databaseUrl, WEB_DIR: '.', LOG_LEVEL: 'error' });
  const recorder = new Recorder();
  const source = makeDataSource(databaseUrl).setOptions({ logging: ['query'], logger: recorder });
  await source.initialize();
  const jobs = { send: () => Promise.resolve(), later: () => Promise.resolve() };
  const app = makeApp({ config, source, jobs, clock: () => new Date() }, makeLogger(config, { write() {} }));
  const server = createServer(app).listen(0, '127.0.0.1');
  await once(server, 'listening');
  const agent = new Agent({ keepAlive: true, maxSockets: 1 });
  const port = portOf(server);
  return {
    recorder,
    get: (path) => answered({ host: '127.0.0.1', port, agent, path: `/api${path}` }),
    stop: async () => {
      agent.destroy();
      server.close();
      await source.destroy();
    },
  };
}

function answered(asked: { host: string; port: number; agent: Agent; path: string }): Promise<string> {
  return new Promise((done, failed) => {
    request(asked, (answer) => {
      let text = '';
      answer.setEncoding('utf8');
      answer.on('data', (part: string) => (text += part));
      answer.on('end', () =>
        answer.statusCode === 200
          ? done(text)
          : failed(new Error(`${asked.path} was answered ${answer.statusCode}`)),
      );
    })
      .on('error', failed)
      .end();
  });
}

/** Milliseconds of the middle one of some tries. */
async function middleMs(work: () => Promise<unknown>): Promise<number> {
  const figures: number[] = [];
  for (let n = 0; n < REQUESTS; n += 1) {
    const started = performance.now();
    await work();
    figures.push(performance.now() - started);
  }
  return median(figures);
}

/** An endpoint beside its own statements, asked one after another by the bare driver. */
async function endpointLine(name: string, path: string, on: { program: Program; client: pg.Client }) {
  const { program, client } = on;
  await program.get(path);
  const statements: Statement[] = [];
  program.recorder.statements = statements;
  await program.get(path);
  program.recorder.statements = null;
  const bare = async () => {
    for (const { text, values } of statements) await client.query(text, values);
  };
  await bare();
  const ours: number[] = [];
  const others: number[] = [];
  for (let round = 0; round < ROUNDS; round += 1) {
    ours.push(await middleMs(() => program.get(path)));
    others.push(await middleMs(bare));
  }
  return benchLine({
    name: `server: ${name}, p50 ms`,
    ours: median(ours),
    other: { name: `its ${statements.length} statements by plain pg`, figure: median(others) },
    goal: 'none set',
  });
}

/** The server's lines: starting again with nothing changed, and what its reads cost beside their statements. */
export async function benchServer(site: DemoSite): Promise<string[]> {
  const program = await openProgram(site.databaseUrl);
  const client = new pg.Client({ connectionString: site.databaseUrl });
  await client.connect();
  try {
    const { fisheries } = FisheryList.parse(JSON.parse(await program.get('/fisheries')));
    const lake = fisheries.flatMap(({ lakes }) => lakes).find(({ chart }) => chart !== null);
    if (!lake) throw new Error('The program shows no charted lake: start it with its demo');
    const { pegs } = LakeView.parse(JSON.parse(await program.get(`/lakes/${lake.id}`)));
    const on = { program, client };
    return [
      benchLine({
        name: 'server: npm start again with nothing changed, ms',
        ours: site.readyMs,
        other: { name: 'allowed', figure: START_GOAL_MS },
        goal: '≤ 1',
      }),
      await endpointLine('a lake', `/lakes/${lake.id}`, on),
      ...(pegs[0] ? [await endpointLine('a peg’s page', `/pegs/${pegs[0].id}/page`, on)] : []),
    ];
  } finally {
    await client.end();
    await program.stop();
  }
}
