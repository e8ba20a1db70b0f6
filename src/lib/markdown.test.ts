import { describe, expect, test } from 'vitest';
import { markdown } from './markdown';

test('a note has paragraphs, emphasis, lists and code', () => {
  expect(markdown('Cut at *B*.\n\n- `F_11` is **positive**\n- so is the other')).toBe(
    '<p>Cut at <em>B</em>.</p>\n<ul>\n<li><code>F_11</code> is <strong>positive</strong></li>\n<li>so is the other</li>\n</ul>',
  );
});

test('the index of a symbol is lowered, in running text only', () => {
  expect(markdown('R_B and M_Ed, not change_note or /E_x')).toBe(
    '<p>R<sub>B</sub> and M<sub>Ed</sub>, not change_note or /E_x</p>',
  );
  expect(markdown('[w_Q](https://a.example/w_Q)')).toBe(
    '<p><a href="https://a.example/w_Q" rel="noopener noreferrer">w<sub>Q</sub></a></p>',
  );
});

test('headings stand below those of the page', () => {
  expect(markdown('# One\n\n##### Five')).toBe('<h3>One</h3>\n<h6>Five</h6>');
});

test.each([
  ['http://a.example', '<a href="http://a.example" rel="noopener noreferrer">x</a>'],
  ['HTTPS://a.example', '<a href="HTTPS://a.example" rel="noopener noreferrer">x</a>'],
  ['mailto:a@b.example', '<a href="mailto:a@b.example" rel="noopener noreferrer">x</a>'],
  ['javascript:alert(1)', '<a>x</a>'],
  ['JaVaScRiPt:alert(1)', '<a>x</a>'],
  ['&#106;avascript:alert(1)', '<a>x</a>'],
  ['java\tscript:alert(1)', '[x](java\tscript:alert(1))'],
  ['<javascript:alert(1)>', '<a>x</a>'],
  ['data:text/html,<b>', '<a>x</a>'],
  ['vbscript:x', '<a>x</a>'],
  ['irc://a', '<a>x</a>'],
  ['//a.example', '<a>x</a>'],
  ['/sign-out', '<a>x</a>'],
  ['http://a.example "on\\"load=x"', '<a href="http://a.example" rel="noopener noreferrer">x</a>'],
])('a link to %s leads to the web, to mail or nowhere', (to, expected) => {
  expect(markdown(`[x](${to})`)).toBe(`<p>${expected}</p>`);
});

test.each([
  '<script>alert(1)</script>',
  '<img src=x onerror=alert(1)>',
  '<svg/onload=alert(1)>',
  '<iframe src="javascript:alert(1)"></iframe>',
  '</p></div><form action="https://a.example">',
  '<a href="javascript:alert(1)">x</a>',
  '<!-- --><style>*{display:none}</style>',
  '![x](https://a.example/pixel.png)',
  '![x](javascript:alert(1))',
  '<javascript:alert(1)>',
  '[x]: javascript:alert(1)\n\n[x]',
  '`<script>`\n\n    <script>\n\n```<script>\n<script>\n```',
  '[a](http://x"onmouseover="alert(1))',
  '[<img src=x>](http://a.example/<b>)',
])('%s makes no tag but those of Markdown, and no attribute but a link’s', (hostile) => {
  const tags = markdown(hostile).match(/<[^>]*>/g) ?? [];
  expect(tags.length).toBeGreaterThan(0);
  for (const one of tags)
    expect(one).toMatch(
      /^<(?:\/?(?:p|a|em|strong|code|pre|ul|ol|li|blockquote|h[3-6])|a href="https?:[^"<>]*" rel="noopener noreferrer"|code class="language-[^"<>]*"|hr \/|br \/)>$/,
    );
});

describe('a text that is no note', () => {
  const LIMIT = 1000; // ms; unguarded, each takes many times as long

  test.each([
    ['of 1 MB', 'word *word* <b> '.repeat(65_536)],
    ['of 1 MB in one quote', '>'.repeat(1_048_576)],
    ['of quotes in quotes', '>'.repeat(15_000)],
    ['of lists in lists', '- '.repeat(7_500)],
    ['of numbered lists in lists', '1. '.repeat(5_000)],
    ['of lists that step in', Array.from({ length: 170 }, (_, row) => `${' '.repeat(row)}- a`).join('\n')],
    ['of brackets', '['.repeat(15_000)],
    ['of open links', '[a]('.repeat(3_700)],
    ['of emphasis', '*a_ '.repeat(3_700)],
    ['of emphasis, as much as is read', '*a_ '.repeat(499)],
    ['of open links, as many as are read', '[a]('.repeat(499)],
    ['of ticks, as many as are read', Array.from({ length: 44 }, (_, n) => '`'.repeat(n)).join(' ')],
    ['of fences', '`a '.repeat(5_000)],
    ['of entities', '&amp'.repeat(3_700)],
    ['of tags', '<a '.repeat(5_000)],
  ])('%s is shown at once, and harms nobody', (_, text) => {
    const start = performance.now();
    const html = markdown(text);
    expect(performance.now() - start).toBeLessThan(LIMIT);
    expect(html).not.toContain('<b>');
  });

  test('is shown as it was written', () => {
    expect(markdown(`<b>${'x'.repeat(16_000)}`)).toBe(`<p>&lt;b&gt;${'x'.repeat(16_000)}</p>`);
  });
});
