import { simpleParser, type AddressObject, type ParsedMail } from 'mailparser';
import type { AddressInfo } from 'node:net';
import { SMTPServer } from 'smtp-server';

/** A mail that was caught instead of sent. `links` are the addresses its text names, in order. */
export type CapturedMail = {
  id: string; // its Message-ID
  sentAt: Date;
  from: string;
  to: string;
  subject: string;
  text: string;
  html: string;
  links: readonly string[];
  enclosed: readonly CapturedFile[];
};

/** A file that came with a mail. */
export type CapturedFile = { filename: string; contentType: string; content: Buffer };

export type Capture = {
  /** Where to send mail for it to be caught here. */
  url: string;
  /** Newest last. */
  mails: readonly CapturedMail[];
  close: () => Promise<void>;
};

const KEPT = 200; // the newest; older ones are let go, and nothing outlasts the process
const LARGEST_BYTES = 2_000_000;

/** A mail server on loopback that sends nothing on: what it is handed can be read here instead. */
export async function openCapture(): Promise<Capture> {
  const mails: CapturedMail[] = [];
  const smtp = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS', 'AUTH'],
    disableReverseLookup: true,
    size: LARGEST_BYTES,
    onData: (stream, _envelope, done) => {
      simpleParser(stream, { skipHtmlToText: true, skipTextToHtml: true })
        .then((mail) => {
          keep(mails, caught(mail));
          done();
        })
        .catch((error: Error) => done(error));
    },
  });
  const port = await listening(smtp);
  return {
    url: `smtp://127.0.0.1:${port}`,
    mails,
    close: () => new Promise((closed) => smtp.close(() => closed())),
  };
}

function listening(smtp: SMTPServer): Promise<number> {
  return new Promise((opened, failed) => {
    smtp.once('error', failed);
    smtp.listen(0, '127.0.0.1', () => {
      smtp.off('error', failed);
      // A client that breaks off is its own affair; the mail comes again with the next attempt.
      smtp.on('error', () => {});
      const address: string | AddressInfo | null = smtp.server.address();
      if (address && typeof address === 'object') opened(address.port);
      else failed(new Error('The mail capture has no port'));
    });
  });
}

/** The same mail handed over twice is one mail. */
function keep(mails: CapturedMail[], mail: CapturedMail): void {
  if (mails.some(({ id }) => id === mail.id)) return;
  mails.push(mail);
  if (mails.length > KEPT) mails.shift();
}

function caught(mail: ParsedMail): CapturedMail {
  const text = mail.text ?? '';
  return {
    id: mail.messageId ?? '',
    sentAt: mail.date ?? new Date(0),
    from: addresses(mail.from),
    to: addresses(mail.to),
    subject: mail.subject ?? '',
    text,
    html: mail.html || '',
    links: text.match(/https?:\/\/[^\s<>"]+/g) ?? [],
    enclosed: mail.attachments.map(({ filename, contentType, content }) => ({
      filename: filename ?? '',
      contentType,
      content,
    })),
  };
}

function addresses(field: AddressObject | AddressObject[] | undefined): string {
  const list = field === undefined ? [] : Array.isArray(field) ? field : [field];
  return list.flatMap(({ value }) => value.map(({ address }) => address ?? '')).join(', ');
}
