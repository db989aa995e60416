import { z } from 'zod';
import { ctxOf } from '../http/ctx-of';
import { outOfDeadlock } from '../http/deadlock';
import type { Handler } from '../jobs/worker';
import { expireHold } from './let-go';

const ExpireJob = z.object({ bookingId: z.uuid() });

/** Ends a hold that nobody touched. One that was confirmed, extended or let go of meanwhile is left as it is. */
export const expireHoldJob: Handler = async ({ payload }, server) => {
  const { bookingId } = ExpireJob.parse(payload);
  await outOfDeadlock(() =>
    server.source.transaction(async (tx) => {
      await expireHold(ctxOf(server, tx), bookingId);
    }),
  );
};
