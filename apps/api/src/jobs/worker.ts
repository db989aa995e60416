import type PgBoss from 'pg-boss';
import type pino from 'pino';
import type { JobName } from '../ctx';
import { plainError } from '../http/plain-error';
import type { Server } from '../http/server';
import { takeUpOrphans } from './orphans';

/** One job in hand. A payload is read with its own schema; `id` stays the same over every attempt. */
export type Job = { id: string; payload: unknown; attempt: number };

/** Does one kind of job. It may run twice: the second time must change nothing. A throw brings it round again. */
export type Handler = (job: Job, server: Server, logger: pino.Logger) => Promise<void>;

export type Handlers = Partial<Record<JobName, Handler>>;

export type Work = { boss: PgBoss; server: Server; logger: pino.Logger; handlers: Handlers };

const NAMES: readonly JobName[] = [
  'mail.send',
  'chart.build',
  'photo.resize',
  'picture.resize',
  'files.remove',
  'log.read',
  'refund.ask',
  'payment.close',
  'booking.expire',
  'booking.warn',
  'booking.eve',
  'closure.settle',
];

/** Nothing of these outlasts its being done: a mail holds an address and a secret link. */
const FORGOTTEN: ReadonlySet<JobName> = new Set<JobName>(['mail.send']);

/** Does the queued jobs in this process, one of each kind at a time; heavy ones hand over to a thread of their own. */
export async function work(ground: Work): Promise<{ stop: () => Promise<void> }> {
  const { boss } = ground;
  const names = doable(ground);
  const leave = await takeUpOrphans(ground.server.source, names);
  for (const name of names)
    await boss.work(name, { pollingIntervalSeconds: 0.5, includeMetadata: true }, async (jobs) => {
      for (const job of jobs) await perform(ground, name, job);
    });
  return {
    async stop() {
      for (const name of names) await boss.offWork(name);
      await leave();
    },
  };
}

/** Does every job that waits, now and in order, whatever the clock says; answers how many there were. */
export async function workOff(ground: Work): Promise<number> {
  const { boss } = ground;
  let done = 0;
  for (;;) {
    const before = done;
    for (const name of doable(ground)) {
      const jobs = await boss.fetch(name, { includeMetadata: true, ignoreStartAfter: true });
      for (const job of jobs) {
        try {
          await perform(ground, name, job);
        } catch (error) {
          await boss.fail(name, job.id, { message: String(error) });
          throw error;
        }
        await boss.complete(name, job.id);
        done += 1;
      }
    }
    if (done === before) return done;
  }
}

const doable = ({ handlers }: Work): JobName[] => NAMES.filter((name) => handlers[name]);

async function perform(ground: Work, name: JobName, job: PgBoss.JobWithMetadata<unknown>): Promise<void> {
  const { boss, server, logger, handlers } = ground;
  const attempt = job.retryCount + 1;
  try {
    await handlers[name]?.({ id: job.id, payload: job.data, attempt }, server, logger);
  } catch (error) {
    logger.error({ job: name, id: job.id, attempt, err: error }, 'a job failed');
    throw new Error(plainError(error).message); // the queue keeps what it is thrown
  }
  logger.info({ job: name, id: job.id, attempt }, 'a job is done');
  if (FORGOTTEN.has(name)) await boss.deleteJob(name, job.id);
}
