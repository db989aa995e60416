import { randomBytes } from 'node:crypto';
import { z } from 'zod';

const flag = z.stringbool().default(false);

const Environment = z.object({
  DATABASE_URL: z.url(),
  PORT: z.coerce.number().int().min(0).max(65_535).default(4310),
  HOST: z.string().default('127.0.0.1'),
  /** The address anglers reach this server by: in mailed links and on printed cards. */
  PUBLIC_URL: z.url().optional(),
  /** Signs access tokens. Without one a key is made at start, and sign-ins are refreshed after a restart. */
  ACCESS_TOKEN_SECRET: z.string().min(32).optional(),
  SMTP_URL: z.url().optional(),
  MAIL_FROM: z.string().default('Mereward <post@mereward.invalid>'),
  FILES_DIR: z.string().default('.data/files'),
  /** A bucket to keep files in instead; who may enter is told by AWS_ACCESS_KEY_ID and its like. */
  FILES_S3_BUCKET: z.string().min(3).optional(),
  /** The address of a store that isn't Amazon's. */
  FILES_S3_ENDPOINT: z.url({ protocol: /^https?$/ }).optional(),
  FILES_S3_REGION: z.string().min(1).default('us-east-1'),
  /** The card provider's keys (Stripe). Without both, no cards are taken on the web. */
  STRIPE_SECRET_KEY: z.string().min(8).optional(),
  STRIPE_WEBHOOK_SECRET: z.string().min(8).optional(),
  /** Another address of the provider: the demo's, which takes no real card. */
  STRIPE_URL: z.url({ protocol: /^https?$/ }).optional(),
  WEB_DIR: z.string().default('apps/mobile/dist'),
  /** Shows the demo's captured mail and its sign-ins. Never set where real people's mail could be captured. */
  DEMO: flag,
  /** Set behind a reverse proxy: how many proxies may be believed about the client's address. */
  TRUST_PROXY: z.coerce.number().int().min(0).max(5).default(0),
  LOG_LEVEL: z.enum(['fatal', 'error', 'warn', 'info', 'debug', 'silent']).default('info'),
  /** For tests: a file that holds the instant this server takes for now. */
  CLOCK_FILE: z.string().optional(),
});

export type Config = {
  databaseUrl: string;
  port: number;
  host: string;
  publicUrl: string;
  accessTokenSecret: Buffer;
  smtpUrl: string | null;
  mailFrom: string;
  filesDir: string;
  /** Where files are kept instead of `filesDir`. */
  filesBucket: { name: string; endpoint: string | null; region: string } | null;
  /** Null: no cards are taken on the web. */
  cards: { secretKey: string; webhookSecret: string; url: string | null } | null;
  webDir: string;
  demo: boolean;
  trustProxy: number;
  logLevel: z.infer<typeof Environment>['LOG_LEVEL'];
  clockFile: string | null;
};

/** Says which of the environment's settings can't be used. */
export class SettingsFault extends Error {
  override readonly name = 'SettingsFault';
}

/** Reads the settings from the environment; throws with every wrong one named. */
export function readConfig(env: NodeJS.ProcessEnv): Config {
  const parsed = Environment.safeParse(env);
  if (!parsed.success) {
    const wrong = parsed.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`);
    throw new SettingsFault(`The environment's settings can't be used.\n${wrong.join('\n')}`);
  }
  const e = parsed.data;
  return {
    databaseUrl: e.DATABASE_URL,
    port: e.PORT,
    host: e.HOST,
    publicUrl: (e.PUBLIC_URL ?? `http://127.0.0.1:${e.PORT}`).replace(/\/$/, ''),
    accessTokenSecret: e.ACCESS_TOKEN_SECRET ? Buffer.from(e.ACCESS_TOKEN_SECRET) : randomBytes(32),
    smtpUrl: e.SMTP_URL ?? null,
    mailFrom: e.MAIL_FROM,
    filesDir: e.FILES_DIR,
    filesBucket: e.FILES_S3_BUCKET
      ? { name: e.FILES_S3_BUCKET, endpoint: e.FILES_S3_ENDPOINT ?? null, region: e.FILES_S3_REGION }
      : null,
    cards:
      e.STRIPE_SECRET_KEY && e.STRIPE_WEBHOOK_SECRET
        ? {
            secretKey: e.STRIPE_SECRET_KEY,
            webhookSecret: e.STRIPE_WEBHOOK_SECRET,
            url: e.STRIPE_URL ?? null,
          }
        : null,
    webDir: e.WEB_DIR,
    demo: e.DEMO,
    trustProxy: e.TRUST_PROXY,
    logLevel: e.LOG_LEVEL,
    clockFile: e.CLOCK_FILE ?? null,
  };
}
