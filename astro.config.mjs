import { fileURLToPath } from 'node:url';
import mdx from '@astrojs/mdx';
import node from '@astrojs/node';
import react from '@astrojs/react';
import tailwindcss from '@tailwindcss/vite';
import { defineConfig, envField } from 'astro/config';

const secret = { context: 'server', access: 'secret' };

export default defineConfig({
  output: 'server',
  adapter: node({ mode: 'middleware' }),
  integrations: [react(), mdx()],
  build: { inlineStylesheets: 'never' },
  devToolbar: { enabled: false },
  // Sessions are rows of ours; without a driver the adapter would keep files of its own.
  session: { driver: 'null' },
  security: {
    // Ours, in src/middleware.ts, covers every body type and knows the origin only when the server starts.
    checkOrigin: false,
    // The server in front sets Host from ORIGIN, whatever the client sent.
    allowedDomains: [{}],
  },
  env: {
    schema: {
      DATABASE_URL: envField.string({ ...secret, startsWith: 'postgres' }),
      DATABASE_POOL: envField.number({ ...secret, int: true, min: 1, max: 500, default: 10 }),
      /** Where people reach the product: scheme, host and port, without a path. */
      ORIGIN: envField.string({ ...secret, url: true }),
      /** Shows the demo practice's people and their password on the sign-in page. */
      DEMO: envField.boolean({ ...secret, default: false }),
      /** Of the demo: where the e-mails can be read that its mail catcher has kept. */
      PUTLOG_DEMO_MAIL: envField.string({ ...secret, url: true, optional: true }),
    },
  },
  experimental: {
    csp: {
      directives: [
        "default-src 'none'",
        "img-src 'self' data: blob:",
        "font-src 'self'",
        "connect-src 'self'",
        "worker-src 'self' blob:",
        "manifest-src 'self'",
        "base-uri 'none'",
        "form-action 'self'",
      ],
    },
  },
  vite: {
    plugins: [tailwindcss()],
    // Workers of the browser are built without Astro's plugins, its alias among them.
    resolve: { alias: { '@': fileURLToPath(new URL('./src', import.meta.url)) } },
    // Small faces of KaTeX would be written into its style sheet, where the content policy keeps them from loading.
    build: { assetsInlineLimit: (file) => (file.endsWith('.woff2') ? false : undefined) },
  },
});
