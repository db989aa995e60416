import { z } from 'zod';
import { escapeHtml } from '../http/markup';

/** What goes with a mail, by its id: it is made when the mail is sent, so that no file waits in the queue. */
export const Enclosure = z.strictObject({ kind: z.literal('ticket'), id: z.uuid() });
export type Enclosure = z.infer<typeof Enclosure>;

/** A mail as it waits in the queue: already in words, for one reader. */
export const Letter = z.strictObject({
  to: z.string(),
  subject: z.string(),
  text: z.string(),
  html: z.string(),
  enclosure: Enclosure.optional(),
});
export type Letter = z.infer<typeof Letter>;

/** Lines under a heading of their own. */
export type LetterPart = { title: string; lines: readonly string[] };

/** What a mail says, before it is set: lines, one link that matters, and what to know about it. */
export type Words = {
  subject: string;
  lines: readonly string[];
  large?: { label: string; words: string }; // one thing to be found at a glance
  facts?: readonly (readonly [string, string])[]; // what, and what it is
  link?: { label: string; url: string };
  after?: readonly string[];
  parts?: readonly LetterPart[];
};

const FOOT = 'Mereward sent this because your address was given to it. Nobody reads replies to this address.';

/** One line only: a line break in a name must not become a heading of the mail. */
const oneLine = (text: string): string => text.replace(/\s+/g, ' ').trim();

/** Sets words as plain text and as a page one column wide, readable on a phone in both its themes. */
export function letter(to: string, words: Words): Letter {
  return { to, subject: oneLine(words.subject), text: asText(words), html: asHtml(words) };
}

function asText({ lines, large, facts = [], link, after = [], parts = [] }: Words): string {
  const top = large ? [`${large.label}: ${large.words}`] : [];
  const middle = facts.length > 0 ? [facts.map(([what, is]) => `${what}: ${is}`).join('\n')] : [];
  const way = link ? [`${link.label}:\n${link.url}`] : [];
  const below = parts.map(({ title, lines: said }) => [title.toUpperCase(), ...said].join('\n'));
  return [...lines, ...top, ...middle, ...way, ...after, ...below, `--\n${FOOT}`].join('\n\n') + '\n';
}

const p = (text: string, style = ''): string =>
  `<p style="margin:0 0 16px;overflow-wrap:anywhere;${style}">${escapeHtml(text)}</p>`;

const RULE = 'border-top:1px solid #8A938F';

const factRow = ([what, is]: readonly [string, string]): string =>
  `<tr><th scope="row" style="text-align:left;vertical-align:top;font-weight:600;padding:8px 12px 8px 0;${RULE}">${escapeHtml(what)}</th><td style="vertical-align:top;padding:8px 0;overflow-wrap:anywhere;${RULE}">${escapeHtml(is)}</td></tr>`;

const partHtml = ({ title, lines }: LetterPart): string =>
  `<h2 style="font-size:20px;line-height:1.3;margin:24px 0 8px">${escapeHtml(title)}</h2>\n${lines.map((line) => p(line, 'margin-bottom:8px')).join('\n')}`;

function asHtml({ subject, lines, large, facts = [], link, after = [], parts = [] }: Words): string {
  const top = large
    ? `<p style="margin:0 0 16px">${escapeHtml(large.label)}<br><strong style="font-size:40px;line-height:1.2;letter-spacing:2px;white-space:nowrap">${escapeHtml(large.words)}</strong></p>`
    : '';
  const table =
    facts.length > 0
      ? `<table style="border-collapse:collapse;width:100%;margin:0 0 24px;font-size:17px">${facts.map(factRow).join('\n')}</table>`
      : '';
  const button = link
    ? `<p style="margin:8px 0 24px"><a href="${escapeHtml(link.url)}" style="display:inline-block;padding:14px 22px;border-radius:6px;background:#1F5661;color:#FFFFFF;font-weight:600;text-decoration:none">${escapeHtml(link.label)}</a></p>
<p style="margin:0 0 16px;font-size:15px;word-break:break-all">If that does not open, copy this address:<br>${escapeHtml(link.url)}</p>`
    : '';
  return `<!doctype html>
<html lang="en-GB"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width,initial-scale=1"><meta name="color-scheme" content="light dark"><title>${escapeHtml(oneLine(subject))}</title></head>
<body style="margin:0;padding:24px 16px;font:17px/1.5 'Source Sans 3',system-ui,sans-serif"><div style="max-width:34em;margin:0 auto">
${lines.map((line) => p(line)).join('\n')}
${top}
${table}
${button}
${after.map((line) => p(line)).join('\n')}
${parts.map(partHtml).join('\n')}
${p(FOOT, 'font-size:13px;margin-top:32px')}
</div></body></html>
`;
}
