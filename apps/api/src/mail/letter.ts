import { z } from 'zod';
import { escapeHtml } from '../http/markup';

/** A mail as it waits in the queue: already in words, for one reader. */
export const Letter = z.strictObject({
  to: z.string(),
  subject: z.string(),
  text: z.string(),
  html: z.string(),
});
export type Letter = z.infer<typeof Letter>;

/** What a mail says, before it is set: lines, one link that matters, and what to know about it. */
export type Words = {
  subject: string;
  lines: readonly string[];
  link?: { label: string; url: string };
  after?: readonly string[];
};

const FOOT = 'Mereward sent this because your address was given to it. Nobody reads replies to this address.';

/** One line only: a line break in a name must not become a heading of the mail. */
const oneLine = (text: string): string => text.replace(/\s+/g, ' ').trim();

/** Sets words as plain text and as a page one column wide, readable on a phone in both its themes. */
export function letter(to: string, words: Words): Letter {
  return { to, subject: oneLine(words.subject), text: asText(words), html: asHtml(words) };
}

function asText({ lines, link, after = [] }: Words): string {
  const middle = link ? [`${link.label}:\n${link.url}`] : [];
  return [...lines, ...middle, ...after, `--\n${FOOT}`].join('\n\n') + '\n';
}

function asHtml({ subject, lines, link, after = [] }: Words): string {
  const p = (text: string, style = '') => `<p style="margin:0 0 16px;${style}">${escapeHtml(text)}</p>`;
  const button = link
    ? `<p style="margin:8px 0 24px"><a href="${escapeHtml(link.url)}" style="display:inline-block;padding:14px 22px;border-radius:6px;background:#1F5661;color:#FFFFFF;font-weight:600;text-decoration:none">${escapeHtml(link.label)}</a></p>
<p style="margin:0 0 16px;font-size:15px;word-break:break-all">If that does not open, copy this address:<br>${escapeHtml(link.url)}</p>`
    : '';
  return `<!doctype html>
<html lang="en-GB"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width,initial-scale=1"><meta name="color-scheme" content="light dark"><title>${escapeHtml(oneLine(subject))}</title></head>
<body style="margin:0;padding:24px 16px;font:17px/1.5 'Source Sans 3',system-ui,sans-serif"><div style="max-width:34em;margin:0 auto">
${lines.map((line) => p(line)).join('\n')}
${button}
${after.map((line) => p(line)).join('\n')}
${p(FOOT, 'font-size:13px;margin-top:32px')}
</div></body></html>
`;
}
