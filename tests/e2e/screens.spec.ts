import { expect, type Page, test } from '@playwright/test';
import { enter } from './support/person';
import { expectSound, WIDTHS } from './support/screen';

test.use({ bypassCSP: true });
test.setTimeout(90_000);

const TEMPLATE = '/templates/propped-cantilever-overhang-uniform';
const SCREENS = {
  catalogue: '/templates',
  'catalogue without an answer': '/templates?q=zzzqqq',
  template: TEMPLATE,
  'template in error': `${TEMPLATE}?L=0`,
  'template of loads in rows': '/templates/simple-span-points-uniform',
  sections: '/sections?q=hea200',
  'sections without an answer': '/sections?q=zzzqqq',
  section: '/sections/american-wide-flange/W12x26',
  stock: '/sections/stock',
  'stock list': '/sections/stock/marrowick-steel-stock',
  jobs: '/jobs',
  job: '/jobs/Q-2417',
  'new job': '/jobs/new',
  'choice of a template': '/jobs/Q-2417/members/new',
  'new member': '/jobs/new-member?template=simple-span-uniform',
  member: '/jobs/Q-2417/members/LF4',
  'calc sheet': '/jobs/Q-2417/members/LF4/sheet',
  'library desk': '/library',
  'library document': '/library/template/simple-span-uniform',
  review: '/library/template/simple-span-uniform/revisions/1',
  'new document': '/library/new',
  'new request': '/library/requests/new?from=/jobs/Q-2417',
  account: '/account',
  notices: '/notices',
  help: '/help/units',
};

function listen(page: Page): string[] {
  const said: string[] = [];
  page.on('console', (message) => message.type() === 'error' && said.push(message.text()));
  page.on('pageerror', (error) => said.push(error.message));
  return said;
}

for (const [name, path] of Object.entries(SCREENS))
  test(`${name}: sound at every width, by day and by night, and no error said to the console`, async ({
    page,
    baseURL,
  }) => {
    await enter(page, baseURL);
    const said = listen(page);
    for (const width of WIDTHS) {
      await page.setViewportSize({ width, height: 900 });
      const answer = await page.goto(path, { waitUntil: 'networkidle' });
      expect(answer?.status()).toBe(200);
      await expectSound(page, String(width));
    }
    expect(said).toEqual([]);
  });

test('sign-in and its refusal are sound', async ({ page }) => {
  for (const width of WIDTHS) {
    await page.setViewportSize({ width, height: 900 });
    await page.goto('/sign-in', { waitUntil: 'networkidle' });
    await expectSound(page, `sign-in ${width}`);
  }
  await page.getByLabel('E-mail').fill('nobody@quillmere.example');
  await page.getByLabel('Password').fill('not-the-password');
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await expect(page.getByRole('alert').first()).toBeVisible();
  await expectSound(page, 'refused');
});

test('a form that comes back, a member in error and a lost address are sound', async ({ page, baseURL }) => {
  await enter(page, baseURL);
  await page.goto('/jobs/new', { waitUntil: 'networkidle' });
  await page.locator('#new-job').evaluate((form: HTMLFormElement) => {
    form.noValidate = true;
    form.requestSubmit();
  });
  await expect(page.getByText('Give the job a name.')).toBeVisible();
  await expect(page.getByLabel('Number')).toBeFocused();
  for (const width of WIDTHS) {
    await page.setViewportSize({ width, height: 900 });
    await expectSound(page, `form ${width}`);
  }
  await page.goto('/jobs/Q-2417/members/LF4', { waitUntil: 'networkidle' });
  await page.getByRole('textbox', { name: /Span/ }).fill('0');
  await expect(page.getByText('One input stops the drawing')).toBeVisible();
  for (const width of WIDTHS) {
    await page.setViewportSize({ width, height: 900 });
    await expectSound(page, `member in error ${width}`);
  }
  page.on('dialog', (dialog) => dialog.accept());
  await page.goto('/nowhere', { waitUntil: 'networkidle' });
  await expectSound(page, 'lost');
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
  await page.goto(TEMPLATE);
  await expect(page.getByRole('img', { name: /span|beam/i }).first()).toBeVisible();
  await context.close();
});
