import type { LogOptions } from '@mereward/shared/surveys/log-contract';
import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import { z } from 'zod';
import type { Jobs } from '../ctx';
import type { WorkTable } from '../jobs/claimed-run';

export const ReadLogJob = z.object({ logId: z.uuid(), attempt: z.uuid() });

export const LOG_READINGS: WorkTable = {
  name: 'sounding_import',
  key: 'id',
  takenWhen: 'undone_at IS NULL',
  job: 'log.read',
  payload: (logId, attempt): z.infer<typeof ReadLogJob> => ({ logId, attempt }),
  cutShort: (tries) =>
    `The reading was cut short ${tries} times. Nothing was taken in. Bring the log in parts.`,
};

type Asked = { logId: string; goal: 'look' | 'keep'; options: LogOptions };

/** Puts the reading of a log in the queue, as part of the deed that asks for it. */
export async function queueLog(
  tx: EntityManager,
  jobs: Jobs,
  { logId, goal, options }: Asked,
): Promise<void> {
  const attempt = randomUUID();
  await tx.query(
    `UPDATE sounding_import
        SET attempt = $2, goal = $3, options = $4, state = 'queued', step = 'Waiting for its turn', share = 0,
            error = NULL, cancel_asked_at = NULL, tries = 0, updated_at = clock_timestamp()
      WHERE id = $1`,
    [logId, attempt, goal, options],
  );
  await jobs.send(tx, 'log.read', { logId, attempt });
}
