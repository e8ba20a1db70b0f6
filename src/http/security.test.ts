import { expect, test } from 'vitest';
import { secure } from './security';

const CSP = 'content-security-policy';
const PAGE = { 'content-type': 'text/html', [CSP]: "default-src 'none'; script-src 'self';" };

test('a page keeps the policy that Astro gave it, with what Astro cannot say', () => {
  const { headers } = secure(new Response('<p>', { headers: PAGE }), true);
  expect(headers.get(CSP)).toBe(
    "default-src 'none'; script-src 'self'; style-src-attr 'unsafe-inline'; frame-ancestors 'none'",
  );
  expect(headers.get('content-type')).toBe('text/html; charset=utf-8');
  expect(headers.get('cache-control')).toBe('private, no-cache');
  expect(headers.get('strict-transport-security')).toBe('max-age=31536000; includeSubDomains');
});

test('an answer that is no page can load and do nothing', () => {
  const { headers } = secure(new Response('{}', { headers: { 'content-type': 'application/json' } }), false);
  expect(headers.get(CSP)).toMatch(/^default-src 'none';/);
  expect(headers.has('strict-transport-security')).toBe(false);
});

test('an empty answer leaves the policy to the page that may take its place', () => {
  expect(secure(new Response(null, { status: 404 }), false).headers.has(CSP)).toBe(false);
});
