import { EMERGENCY } from '@mereward/shared/charts/cautions';
import { createHash } from 'node:crypto';
import { markup, Markup } from '../../http/markup';

/** A page of words without any script: its text, and the policy that holds it to that. */
export type LightDocument = { text: string; policy: string };

type Framed = { title: string; over: string; body: Markup; head?: Markup; day?: string; dusk?: string };

const STYLE = `:root{color-scheme:light dark;--paper:#FAF7F0;--sheet:#FFF;--rule:#DAD3C4;--ink:#1B2423;--soft:#55605D;--water:#1F5661;--reed:#48682F;--amber:#8A5A00;--brick:#9B2226;DAY}
@media (prefers-color-scheme:dark){:root{--paper:#12181A;--sheet:#1A2326;--rule:#2F3B3F;--ink:#EDE8DC;--soft:#A9B3AE;--water:#7FB9C2;--reed:#A6C98A;--amber:#E9B44C;--brick:#FF8C86;DUSK}}
*{box-sizing:border-box}
body{margin:0;background:var(--paper);color:var(--ink);font:17px/1.5 'Source Sans 3',SourceSans,system-ui,sans-serif;font-variant-numeric:tabular-nums;overflow-wrap:break-word}
main,footer{max-width:42rem;margin:0 auto;padding:16px}
h1{font-size:34px;line-height:1.15;margin:0 0 8px}h2{font-size:20px;margin:32px 0 4px}h3{font-size:20px;margin:0}
p{margin:8px 0}.over,.soft{color:var(--soft)}.figure{font-size:26px;line-height:1.25;font-weight:600;margin:4px 0 0}.figure span{font-size:17px;font-weight:400}
.open{color:var(--reed)}.limited,.ageing,.old,.changed{color:var(--amber)}.closed{color:var(--brick)}.state{font-weight:600}
.note{border:2px solid var(--amber);background:var(--sheet);padding:8px 16px;margin:16px 0}.danger{border-color:var(--brick)}.note h2{margin:0}
figure{margin:16px -16px 0;text-align:center}figure svg{max-width:100%;height:auto}figcaption{text-align:left;padding:0 16px}
ol{list-style:none;margin:0;padding:0}ol li{border-top:1px solid var(--rule);padding:16px 0}
dl{margin:0}dl div{display:flex;flex-wrap:wrap;gap:0 16px;border-bottom:1px solid var(--rule);padding:8px 0}dt{flex:1 1 9rem;color:var(--soft)}dd{flex:2 1 14rem;margin:0}
a{color:var(--water)}.go{display:inline-flex;align-items:center;min-height:48px;margin-right:16px}
form{display:flex;flex-wrap:wrap;gap:8px;align-items:end}label{flex:1 1 100%}
input,button{font:inherit;min-height:48px;padding:8px 12px;border:1px solid var(--soft);border-radius:4px;background:var(--sheet);color:var(--ink);max-width:100%}button{font-weight:600}
:focus-visible{outline:3px solid var(--water);outline-offset:2px}
footer{border-top:2px solid var(--brick);font-weight:600}
@media print{.screen{display:none}}`;

/** A page in the fishery's paper and ink, by day and by dusk. Nothing is fetched but the page itself. */
export function lightDocument({ title, over, body, head, day = '', dusk = '' }: Framed): LightDocument {
  const style = STYLE.replace('DAY', day).replace('DUSK', dusk);
  const page = markup`<!doctype html><html lang="en-GB"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width,initial-scale=1">
<title>${title}</title><link rel="icon" href="data:,">${head ?? null}
<style>${new Markup(style)}</style></head><body><main>
<p class="over">${over}</p>
${body}
</main><footer>${EMERGENCY}</footer></body></html>
`;
  return { text: page.text, policy: policyFor(style) };
}

/** Allows this very style and forms that come back here; no script, no picture, no frame, nothing from elsewhere. */
function policyFor(style: string): string {
  const digest = createHash('sha256').update(style).digest('base64');
  return [
    "default-src 'none'",
    `style-src 'sha256-${digest}'`,
    'img-src data:',
    "form-action 'self'",
    "base-uri 'none'",
    "frame-ancestors 'none'",
  ].join('; ');
}
