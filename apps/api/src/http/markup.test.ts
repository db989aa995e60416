import { expect, test } from 'vitest';
import { markup } from './markup';

test('what is put into a page is text, whatever it looks like', () => {
  const name = `<script>alert("1")</script> & 'so'`;
  expect(markup`<p title="${name}">${name}</p>`.text).toBe(
    '<p title="&lt;script&gt;alert(&quot;1&quot;)&lt;/script&gt; &amp; &#39;so&#39;">&lt;script&gt;alert(&quot;1&quot;)&lt;/script&gt; &amp; &#39;so&#39;</p>',
  );
});

test('HTML made before, lists and what is missing are set as they are', () => {
  const items = ['a', 'b'].map((each) => markup`<li>${each}</li>`);
  expect(
    markup`<ul>
        ${items}
      </ul>
      ${null}${false}${3}`.text.replace(/\s+/g, ''),
  ).toBe('<ul><li>a</li><li>b</li></ul>3');
});
