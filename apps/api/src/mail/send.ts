import { sendingTime } from '@mereward/shared/time/quiet-hours';
import nodemailer, { type Transporter } from 'nodemailer';
import type { Config } from '../config';
import type { Ctx } from '../ctx';
import type { Letter } from './letter';

/** Puts a mail in the post of this deed: it leaves once the deed is committed, and never otherwise. */
export async function post({ tx, jobs }: Pick<Ctx, 'tx' | 'jobs'>, letter: Letter): Promise<void> {
  await jobs.send(tx, 'mail.send', letter);
}

/** The same for what can wait: in the quiet hours of a zone it stays until the morning. */
export async function postByDay(
  { tx, jobs, now }: Pick<Ctx, 'tx' | 'jobs' | 'now'>,
  payload: Letter,
  zone: string,
): Promise<void> {
  const afterSeconds = (sendingTime(now, zone).getTime() - now.getTime()) / 1000;
  await jobs.later(tx, { name: 'mail.send', payload, afterSeconds });
}

const transports = new WeakMap<Config, Transporter>();

function transportOf(config: Config): Transporter {
  const known = transports.get(config);
  if (known) return known;
  if (!config.smtpUrl) throw new Error('No mail server is set (SMTP_URL), so this mail stays in the queue');
  const made = nodemailer.createTransport({
    url: config.smtpUrl,
    connectionTimeout: 10_000,
    greetingTimeout: 10_000,
    socketTimeout: 30_000,
    disableFileAccess: true,
    disableUrlAccess: true,
  });
  transports.set(config, made);
  return made;
}

/** A file as it goes with a mail. */
export type Enclosed = { filename: string; contentType: string; content: Buffer };

type Sending = { letter: Letter; enclosed: readonly Enclosed[]; jobId: string; date: Date };

/** Hands one mail to the mail server. Every attempt bears the same Message-ID, so that a repeat is known as one. */
export async function deliver(config: Config, { letter, enclosed, jobId, date }: Sending): Promise<void> {
  const { to, subject, text, html } = letter;
  const host = new URL(config.publicUrl).hostname;
  await transportOf(config).sendMail({
    messageId: `<${jobId}@${host}>`,
    from: config.mailFrom,
    to: { name: '', address: to },
    date,
    subject,
    text,
    html,
    attachments: [...enclosed],
    headers: { 'Auto-Submitted': 'auto-generated' },
  });
}
