import { QueryFailedError } from 'typeorm';
import { z } from 'zod';

const Coded = z.object({ code: z.string() });

/** The network's own words, then PostgreSQL's: connections (08), shutting down, crashing, starting, closed to new ones. */
const AWAY = /^(ECONNREFUSED|ECONNRESET|EPIPE|ETIMEDOUT|ENOTFOUND|EAI_AGAIN|08...|57P01|57P02|57P03|55000)$/;
/** The driver tells a connection that broke off, or never came about, in words alone. */
const BROKEN =
  /^(Connection terminated|timeout exceeded when trying to connect|Client has encountered a connection error)/;

/** Did this fail because the database is not there just now, rather than by what was asked of it? */
export function isDatabaseAway(error: unknown): boolean {
  if (!(error instanceof Error)) return false;
  const cause = error instanceof QueryFailedError ? error.driverError : error;
  const code = Coded.safeParse(cause).data?.code;
  return (code !== undefined && AWAY.test(code)) || BROKEN.test(cause.message);
}
