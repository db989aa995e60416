import { z } from 'zod';

const DriverFault = z.object({
  driverError: z.object({
    code: z.string(),
    constraint: z.string().optional(),
    table: z.string().optional(),
  }),
});

export type PlainError = {
  type: string;
  message: string;
  stack?: string;
  code?: string;
  constraint?: string;
  table?: string;
  /** What lay behind it, such as why a store couldn't be reached. */
  cause?: string;
};

const ADDRESS = /[^\s<>"'(=:]+@[^\s<>"'),;]+/g;

/**
 * What may be written down of a failure. The database's own words repeat the row that failed, and a mail server's
 * the address it refused, so of the first only the names of things are kept, and of any message no address.
 */
export function plainError(error: unknown): PlainError {
  if (!(error instanceof Error))
    return { type: typeof error, message: 'something that is no error was thrown' };
  const frames = (error.stack ?? '').split('\n').filter((line) => /^\s+at /.test(line));
  const stack = frames.join('\n');
  const fault = DriverFault.safeParse(error);
  if (fault.success) {
    const { code, constraint, table } = fault.data.driverError;
    return {
      type: error.name,
      message: 'the database refused a statement',
      stack,
      code,
      ...(constraint === undefined ? {} : { constraint }),
      ...(table === undefined ? {} : { table }),
    };
  }
  return {
    type: error.name,
    message: error.message.replace(ADDRESS, '…@…'),
    stack,
    ...(error.cause instanceof Error && !DriverFault.safeParse(error.cause).success
      ? { cause: `${error.cause.name}: ${error.cause.message.replace(ADDRESS, '…@…')}` }
      : {}),
  };
}
