import { moneyWords } from '@mereward/shared/money/money';
import { createHash } from 'node:crypto';
import { Markup, markup } from '../../http/markup';
import { currencyOf } from '../../payments/currency';
import { CARDS } from './deeds';
import type { Session } from './kept';

const STYLE = `:root{color-scheme:light dark;--ground:#f4f6f4;--ink:#16211f;--line:#7c8a86;--deed:#1f5661;--on:#fff}
@media(prefers-color-scheme:dark){:root{--ground:#10181a;--ink:#e8eeec;--line:#8a9a97;--deed:#9fd0d8;--on:#0d1516}}
body{margin:0;padding:24px 16px;background:var(--ground);color:var(--ink);font:17px/1.5 system-ui,sans-serif}
main{max-width:30em;margin:0 auto}h1{font-size:1.5em;line-height:1.2}
.demo{border:2px dashed var(--line);padding:12px 16px}
fieldset{border:0;margin:0;padding:0}legend{font-weight:600;padding:0}
label{display:flex;gap:12px;align-items:center;min-height:48px}input{width:22px;height:22px;accent-color:var(--deed)}
button{display:block;width:100%;min-height:56px;margin:12px 0;border:2px solid var(--deed);border-radius:6px;font:inherit;font-weight:600;background:var(--deed);color:var(--on)}
button.plain{background:none;color:inherit}a{color:inherit;display:inline-block;padding:12px 0}
.fault{border-left:6px solid #a33;padding-left:12px;font-weight:600}`;

/** No script, one style known by its digest, forms to here and on to where the payer came from. */
export function policyFor(session: Session | null): string {
  const style = createHash('sha256').update(STYLE).digest('base64');
  const back = session ? ` ${new URL(session.success_url).origin}` : '';
  return `default-src 'none'; style-src 'sha256-${style}'; form-action 'self'${back}; frame-ancestors 'none'; base-uri 'none'`;
}

const page = (title: string, body: Markup): string =>
  markup`<!doctype html>
<html lang="en-GB"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width,initial-scale=1"><title>${title}</title><style>${new Markup(STYLE)}</style></head>
<body><main><h1>${title}</h1>
<p class="demo">This is the demo’s card page. It takes no real card and no money. Choose what the card should do.</p>
${body}</main></body></html>`.text;

const amountOf = ({ amount_total: pence, currency }: Session): string =>
  moneyWords(pence, currencyOf(currency.toUpperCase()));

export const payPage = (session: Session, fault: string): string =>
  page(
    `Pay ${amountOf(session)}`,
    markup`<p>${session.description}</p>
${fault === '' ? null : markup`<p class="fault" role="alert">${fault}</p>`}
<form method="post" action="/pay/${session.id}"><fieldset><legend>Card</legend>
${Object.entries(CARDS).map(
  ([card, words], index) =>
    markup`<label><input type="radio" name="card" value="${card}" ${index === 0 ? new Markup('checked') : null}> ${words}</label>`,
)}</fieldset><button type="submit">Pay ${amountOf(session)}</button></form>
<p><a href="${session.cancel_url}">Back without paying</a></p>`,
  );

export const bankPage = (session: Session): string =>
  page(
    'Your bank asks',
    markup`<p>Is it you who pays ${amountOf(session)}?</p>
<form method="post" action="/pay/${session.id}/bank"><button name="answer" value="yes">Yes, pay it</button><button class="plain" name="answer" value="no">No</button></form>`,
  );

export const closedPage = (session: Session): string =>
  page(
    session.status === 'complete' ? 'This has been paid' : 'This page has closed',
    markup`<p>${
      session.status === 'complete'
        ? 'Go back to see your ticket.'
        : 'Nothing was taken. Go back to see how your booking stands.'
    }</p><p><a href="${session.status === 'complete' ? session.success_url : session.cancel_url}">Back</a></p>`,
  );

export const noSuchPage = (): string =>
  page('There is no such page', markup`<p>Go back and begin again.</p>`);
