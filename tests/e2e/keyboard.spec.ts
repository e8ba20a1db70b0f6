import { expect, type Page, test } from '@playwright/test';
import { tabTo, typeOver } from './support/keys';
import { enter } from './support/person';

test.setTimeout(90_000);

const JOB = '/api/v1/jobs/Q-2417/members';

async function place(page: Page, baseURL: string | undefined): Promise<string> {
  const mark = `K${Date.now() % 1_000_000}`;
  const data = { mark, title: 'By keys', template: 'propped-cantilever-overhang-uniform' };
  const answer = await page.request.post(JOB, { data, headers: { origin: new URL(baseURL ?? '').origin } });
  expect(answer.status()).toBe(201);
  return mark;
}

/** Somebody else saves the member under another title. */
async function saveElsewhere(
  page: Page,
  baseURL: string | undefined,
  mark: string,
  title: string,
): Promise<void> {
  const { template, section, criteria, ...member } = await (await page.request.get(`${JOB}/${mark}`)).json();
  const data = {
    ...pick(member, [
      'purpose',
      'status',
      'reason',
      'parameters',
      'self_weight',
      'self_weight_reason',
      'redundants',
    ]),
    title,
    section: section && pick(section, ['designation', 'table', 'material']),
    criteria: criteria?.slug ?? null,
  };
  const headers = { origin: new URL(baseURL ?? '').origin, 'If-Match': `"${member.version}"` };
  const answer = await page.request.put(`${JOB}/${mark}`, { data, headers });
  expect(answer.status(), await answer.text()).toBe(200);
}

const pick = (from: Record<string, unknown>, names: readonly string[]) =>
  Object.fromEntries(names.map((name) => [name, from[name]]));

test('a member is worked by keys alone, and the focus is never lost', async ({ page, baseURL }) => {
  await enter(page, baseURL);
  const mark = await place(page, baseURL);
  const focus = page.locator(':focus');
  await page.goto(`/jobs/Q-2417/members/${mark}`, { waitUntil: 'networkidle' });

  await test.step('a load is typed, a group added and taken out', async () => {
    await tabTo(page, /Uniform load, G/);
    await typeOver(page, '6');
    await tabTo(page, /Add a group/);
    await page.keyboard.press('Enter');
    await page.keyboard.press('Tab');
    await page.keyboard.press('Enter');
    await expect(focus).toHaveAccessibleName(/Uniform load, [^G]/);
    await page.keyboard.type('4');
    await tabTo(page, /Remove Uniform load, [^G]/, 'Shift+Tab');
    await page.keyboard.press('Enter');
    await expect(focus).toHaveAccessibleName(/Uniform load, G/);
  });

  await test.step('a section is looked for and used', async () => {
    await tabTo(page, /^Designation/);
    await page.keyboard.type('ipe 300');
    await expect(page.getByRole('button', { name: 'Use IPE 300', exact: true })).toBeVisible();
    await tabTo(page, /^Use IPE 300$/);
    await page.keyboard.press('Enter');
    await expect(focus).toHaveAccessibleName('IPE 300 is in use');
  });

  await test.step('criteria are chosen', async () => {
    await tabTo(page, /^Criteria/, 'Shift+Tab');
    await page.keyboard.press('ArrowDown');
    await expect(page.getByText('Bending stress').first()).toBeVisible();
  });

  await test.step('an input that fails is put back', async () => {
    await tabTo(page, /^L Span$/, 'Shift+Tab');
    await typeOver(page, '0');
    await tabTo(page, /Put back the last good values/, 'Shift+Tab');
    await page.keyboard.press('Enter');
    await expect(focus).toHaveAccessibleName(/Span/);
    await expect(focus).toHaveValue('6');
  });

  await test.step('it is saved, and the button keeps the focus', async () => {
    await tabTo(page, /^Save/);
    await page.keyboard.press('Enter');
    await expect(page.getByText('Saved as version 2')).toBeVisible();
    await expect(focus).toHaveAccessibleName('Save');
  });

  await test.step('an edit on a version that somebody saved over is settled', async () => {
    await tabTo(page, /^Title/, 'Shift+Tab');
    await typeOver(page, 'Mine');
    await saveElsewhere(page, baseURL, mark, 'Theirs');
    await tabTo(page, /^Save/);
    await page.keyboard.press('Enter');
    await expect(page.getByText(/Not saved\. .* saved version 3/)).toBeVisible();
    await expect(focus).toContainText('Not saved.');
    await tabTo(page, /Theirs|Mine/);
    await page.keyboard.press('ArrowLeft');
    await tabTo(page, /Save with these choices/);
    await page.keyboard.press('Enter');
    await expect(page.getByText('Saved as version 4')).toBeVisible();
    await expect(focus).toHaveAccessibleName('Title block');
    await expect(page.getByRole('heading', { name: 'Theirs', level: 1 })).toBeVisible();
  });

  await test.step('it is removed, with the reason', async () => {
    await tabTo(page, /Remove this member/);
    await page.keyboard.press('Enter');
    await tabTo(page, /^Because/);
    await page.keyboard.type('Drawn twice');
    await tabTo(page, /^Remove$/);
    await page.keyboard.press('Enter');
    await expect(page.getByText('Removed: Drawn twice')).toBeVisible();
    await expect(focus).toContainText('Saved as version 5');
  });
});
