import type { Handler } from '../jobs/worker';
import { Letter } from './letter';
import { deliver } from './send';

export const sendMail: Handler = async (job, server) => {
  const letter = Letter.parse(job.payload);
  await deliver(server.config, { letter, jobId: job.id, date: server.clock() });
};
