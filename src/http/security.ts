const HEADERS = {
  'X-Content-Type-Options': 'nosniff',
  'X-Frame-Options': 'DENY',
  'Referrer-Policy': 'same-origin',
  'Cross-Origin-Opener-Policy': 'same-origin',
  'Cross-Origin-Resource-Policy': 'same-origin',
  'Permissions-Policy': 'camera=(), geolocation=(), microphone=(), payment=(), usb=()',
};

const CSP = 'Content-Security-Policy';

const ADDED = "style-src-attr 'unsafe-inline'; frame-ancestors 'none'";

/** The policy of an answer that is no page: it loads nothing and is shown in nothing. */
const INERT = "default-src 'none'; frame-ancestors 'none'; base-uri 'none'; form-action 'none'";

/**
 * Headers of every answer. Astro gives a page its policy with the hashes of its scripts and styles; what it cannot say
 * is added: style attributes (KaTeX, React and the virtual table position with them) and who may frame the page.
 */
export function secure(response: Response, https: boolean): Response {
  const { headers } = response;
  for (const [name, value] of Object.entries(HEADERS)) headers.set(name, value);
  if (https) headers.set('Strict-Transport-Security', 'max-age=31536000; includeSubDomains');
  const policy = headers.get(CSP);
  // A page that says why another was refused is rendered within its request, and passes here twice.
  if (policy && !policy.includes(ADDED)) headers.set(CSP, `${policy.replace(/;?\s*$/, ';')} ${ADDED}`);
  // Astro puts its 404 page in place of an empty answer and keeps the headers that the answer had. The development
  // server gives pages no policy: it inlines its scripts, and without a policy they run.
  else if (!policy && response.body !== null && !(import.meta.env.DEV && isPage(headers)))
    headers.set(CSP, INERT);
  if (isPage(headers)) {
    headers.set('Content-Type', 'text/html; charset=utf-8');
    // A page shows what its reader may see: it is kept by their browser for Back, and by nobody else.
    if (!headers.has('Cache-Control')) headers.set('Cache-Control', 'private, no-cache');
  }
  return response;
}

const isPage = (headers: Headers): boolean => headers.get('Content-Type')?.startsWith('text/html') ?? false;
