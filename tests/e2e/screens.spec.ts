import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { expect, test } from '@playwright/test';
import type { AxeResults } from 'axe-core';
import { enter } from './support/person';

/** Read whole and put into the page: the content policy is bypassed for it alone. */
const AXE = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');
test.use({ bypassCSP: true });

const SCREENS = {
  catalogue: '/templates',
  template: '/templates/propped-cantilever-overhang-uniform',
  'template in error': '/templates/propped-cantilever-overhang-uniform?L=0',
  sections: '/sections?q=hea200',
  section: '/sections/american-wide-flange/W12x26',
  jobs: '/jobs',
  job: '/jobs/Q-2417',
  'new job': '/jobs/new',
  'new member': '/jobs/new-member?template=simple-span-uniform',
  member: '/jobs/Q-2417/members/LF4',
  account: '/account',
  notices: '/notices',
  help: '/help/units',
};
const LOOKS = [
  { width: 1440, scheme: 'light' },
  { width: 1024, scheme: 'dark' },
  { width: 390, scheme: 'light' },
] as const;

for (const [name, path] of Object.entries(SCREENS))
  test(`${name}: nothing serious for assistive technology, nothing beside the page, no error said to the console`, async ({
    page,
    baseURL,
  }) => {
    await enter(page, baseURL);
    const said: string[] = [];
    page.on('console', (message) => message.type() === 'error' && said.push(message.text()));
    page.on('pageerror', (error) => said.push(error.message));
    for (const { width, scheme } of LOOKS) {
      await page.setViewportSize({ width, height: 900 });
      await page.emulateMedia({ colorScheme: scheme });
      const answer = await page.goto(path, { waitUntil: 'networkidle' });
      expect(answer?.status()).toBe(200);
      const beside = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
      expect(beside, `overflow at ${width}`).toBeLessThanOrEqual(0);
      await page.evaluate(AXE);
      const found = await page.evaluate(async () => {
        const { axe } = window as unknown as { axe: { run: () => Promise<AxeResults> } };
        const { violations } = await axe.run();
        return violations
          .filter(({ impact }) => impact === 'serious' || impact === 'critical')
          .map(({ id, nodes }) => `${id}: ${nodes[0]?.html}`);
      });
      expect(found, `${width}, ${scheme}`).toEqual([]);
    }
    expect(said).toEqual([]);
  });

test('without a script the catalogue and a template still say what they hold', async ({
  browser,
  baseURL,
}) => {
  const context = await browser.newContext({ javaScriptEnabled: false, ...(baseURL && { baseURL }) });
  const page = await context.newPage();
  await enter(page, baseURL);
  await page.goto('/templates');
  await expect(page.getByText('Propped cantilever with overhang, uniform load on all').first()).toBeVisible();
  await page.goto('/templates/propped-cantilever-overhang-uniform');
  await expect(page.getByRole('img', { name: /span|beam/i }).first()).toBeVisible();
  await context.close();
});
