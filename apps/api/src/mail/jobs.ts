import type { Server } from '../http/server';
import type { Handler } from '../jobs/worker';
import { Letter, type Enclosure } from './letter';
import { deliver, type Enclosed } from './send';

/** Makes what goes with a mail, when it is sent; a mail sent again bears the same. */
export type Enclose = (server: Server, enclosure: Enclosure) => Promise<Enclosed[]>;

/** Sends mail. What is enclosed belongs to words further up, so it is made by whoever puts the handlers together. */
export const sendMail =
  (enclose: Enclose): Handler =>
  async (job, server) => {
    const letter = Letter.parse(job.payload);
    const enclosed = letter.enclosure ? await enclose(server, letter.enclosure) : [];
    await deliver(server.config, { letter, enclosed, jobId: job.id, date: server.clock() });
  };
