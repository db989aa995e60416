import { Router } from 'express';
import type { Capture, CapturedMail } from '../mail/capture';
import { escapeHtml } from '../http/markup';

/** The demo's caught mail: `/demo/mail` to read, `/demo/mail.json` for what drives a browser. Newest first. */
export function demoMail(capture: Capture): Router {
  const newestFirst = () => [...capture.mails].reverse();
  return Router()
    .get('/mail', (_req, res) => {
      res.set('Cache-Control', 'no-store').type('html').send(page(newestFirst()));
    })
    .get('/mail.json', (_req, res) => {
      res.set('Cache-Control', 'no-store').json({ mails: newestFirst() });
    });
}

const page = (mails: readonly CapturedMail[]): string => `<!doctype html>
<html lang="en-GB"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width,initial-scale=1">
<link rel="icon" href="data:,">
<title>Mail caught by the demo</title>
<style>
:root{color-scheme:light dark;--paper:#FAF7F0;--sheet:#FFF;--rule:#DAD3C4;--ink:#1B2423;--soft:#55605D;--water:#1F5661}
@media (prefers-color-scheme:dark){:root{--paper:#12181A;--sheet:#1A2326;--rule:#2F3B3F;--ink:#EDE8DC;--soft:#A9B3AE;--water:#7FB9C2}}
body{margin:0;padding:24px 16px;background:var(--paper);color:var(--ink);font:17px/1.5 SourceSans,'Source Sans 3',system-ui,sans-serif}
main{max-width:44rem;margin:0 auto}h1{font-size:26px}h2{font-size:20px;margin:0}
article{background:var(--sheet);border:1px solid var(--rule);padding:16px;margin:16px 0}
dl{display:grid;grid-template-columns:auto 1fr;gap:0 12px;color:var(--soft);font-size:15px;margin:8px 0}dd{margin:0;overflow-wrap:anywhere}
pre{white-space:pre-wrap;overflow-wrap:anywhere;font:inherit;margin:12px 0 0}a{color:var(--water);display:inline-block;padding:12px 0}
</style></head><body><main><h1>Mail caught by the demo</h1>
<p>Nothing was sent to anybody: this server keeps its mail to itself until it is stopped.</p>
<p><a href="/demo/mail">Look again</a></p>
${mails.length === 0 ? '<p>No mail yet. Make an account, or ask for a new password, and look again.</p>' : mails.map(article).join('\n')}
</main></body></html>
`;

const article = (mail: CapturedMail): string => `<article>
<h2>${escapeHtml(mail.subject)}</h2>
<dl><dt>To</dt><dd>${escapeHtml(mail.to)}</dd><dt>From</dt><dd>${escapeHtml(mail.from)}</dd><dt>Sent</dt><dd>${mail.sentAt.toISOString()}</dd></dl>
<pre>${linked(mail)}</pre>
</article>`;

/** The text with its addresses as links. Only http and https addresses were picked out as such. */
function linked({ text, links }: CapturedMail): string {
  let rest = text;
  let set = '';
  for (const link of links) {
    const at = rest.indexOf(link);
    const safe = escapeHtml(link);
    set += `${escapeHtml(rest.slice(0, at))}<a href="${safe}">${safe}</a>`;
    rest = rest.slice(at + link.length);
  }
  return set + escapeHtml(rest);
}
