import { type Browser, expect, type Page, test } from '@playwright/test';
import { Hand } from './support/hand';
import { tabTo } from './support/keys';
import { enter } from './support/person';
import { expectSound, WIDTHS } from './support/screen';

const LIBRARIAN = 'priyanka.velloor@quillmere.example';
const CHECKER = 'imogen.fairlocke@quillmere.example';
const STAMP = Date.now();
const TITLE = 'Two-span beam with an overhang and a point load at the tip';
const SLUG = `two-spans-tip-load-${STAMP}`;
const MARK = `TL${STAMP % 100_000}`;
const REVIEW = `/library/template/${SLUG}/revisions/1`;
/** What the librarian may take: presses, filled fields, choices and keys. */
const MOST = 60;

test.describe.configure({ mode: 'serial' });
test.use({ actionTimeout: 20_000 });

const main = (page: Page, name: string) =>
  page.getByRole('region', { name: 'Title block' }).getByRole('button', { name });
const zone = (page: Page, name: string) => page.getByRole('region', { name, exact: true });
const beamOf = (page: Page) => page.getByRole('listbox', { name: 'Parts of the beam' });

/** The draft's page answers: its islands live. */
async function isOpen(page: Page): Promise<void> {
  await expect(page).toHaveURL(/\/drafts\/1$/);
  await expect(page.locator('astro-island[ssr]')).toHaveCount(0, { timeout: 30_000 });
  await expect(beamOf(page)).toBeVisible();
}

interface Beam {
  readonly L1: number;
  readonly L2: number;
  readonly a: number;
  readonly P: number;
}

/**
 * Clapeyron’s three-moment equation at B, for one EI and no load in the spans: 2 M_B (L1 + L2) + M_C L2 = 0, where
 * statics of the overhang gives M_C = −P a. Then R_A = M_B / L1, and R_B and R_C from the spans’ end shears.
 */
function byThreeMoments({ L1, L2, a, P }: Beam) {
  const atC = -P * a;
  const atB = (-atC * L2) / (2 * (L1 + L2));
  const reactionA = atB / L1;
  const reactionB = (atC - atB) / L2 - reactionA;
  return { atB, reactionA, reactionB, reactionC: P - reactionA - reactionB };
}

/** The values that a proof case stands at, as its fields say them. */
async function readCase(page: Page): Promise<Beam> {
  const value = async (symbol: string) =>
    Number.parseFloat(await zone(page, 'Proof cases').getByLabel(symbol, { exact: true }).inputValue());
  return { L1: await value('L1'), L2: await value('L2'), a: await value('a'), P: await value('P') };
}

async function newPage(browser: Browser, baseURL: string | undefined, email?: string): Promise<Page> {
  const context = await browser.newContext(baseURL ? { baseURL } : {});
  const page = await context.newPage();
  await enter(page, baseURL, email);
  return page;
}

test('a librarian makes a template from nothing, a checker issues it, an engineer places it', async ({
  page,
  browser,
  baseURL,
}) => {
  test.setTimeout(400_000);
  await enter(page, baseURL, LIBRARIAN);
  await page.goto('/library');
  const hand = new Hand(page, MOST);

  await test.step('begun from nothing but its title', async () => {
    await hand.press(page.getByRole('link', { name: 'New template' }).first());
    await hand.fill(page.getByLabel('Title', { exact: true }), TITLE);
    await hand.press(page.getByLabel('Two spans with an overhang'));
    await hand.fill(page.getByLabel('Address'), SLUG);
    await hand.press(main(page, 'Begin the template'));
    await isOpen(page);
  });

  await test.step('the point load is put at the tip, in the place of the uniform one', async () => {
    await hand.press(beamOf(page).getByRole('option', { name: /^Line load w/ }));
    await hand.key('Delete');
    await hand.press(page.getByRole('toolbar').getByRole('button', { name: 'Point load' }));
    const place = page.getByRole('slider', { name: 'Where the point load goes' });
    await expect(place).toHaveAttribute('aria-valuetext', /^L1 \+ L2 \+ a,/);
    await hand.key('Enter');
    await expect(
      beamOf(page).getByRole('option', { name: /^Point load P.* at L1 \+ L2 \+ a/ }),
    ).toBeVisible();
    // At the defaults that the draft begins with.
    const { reactionB } = byThreeMoments({ L1: 6, L2: 6, a: 1.5, P: 10 });
    await expect(zone(page, 'Moment and reactions')).toContainText(`−${Math.abs(reactionB).toFixed(1)} kN`);
  });

  await test.step('with its source, its rules, and cases worked by hand', async () => {
    await hand.press(page.getByRole('button', { name: 'Add the usual rules' }));
    await hand.press(page.getByRole('button', { name: 'Add a derivation of our own' }));
    await hand.fill(
      page.getByLabel('Derivation', { exact: true }),
      'The three-moment equation over B with M_C = −Pa from the overhang; reactions from the end shears.',
    );
    for (let number = 1; number <= 3; number++) {
      const cases = zone(page, 'Proof cases');
      await hand.press(cases.getByRole('button', { name: 'Add a case' }));
      const { reactionA, atB } = byThreeMoments(await readCase(page));
      await hand.fill(cases.getByLabel('Value').first(), `${reactionA.toFixed(5)} kN`);
      await hand.press(cases.getByRole('button', { name: 'Add what else must come out' }));
      // The moment runs straight from A to B to C: the largest sagging one is over B.
      await hand.fill(cases.getByLabel('Value').last(), `${atB.toFixed(5)} kNm`);
    }
  });

  await test.step('with what it is for, and what is new', async () => {
    await hand.fill(
      page.getByLabel('Method', { exact: true }),
      'Release the moment over B. Linear and elastic.',
    );
    await hand.fill(
      page.getByLabel('Use for', { exact: true }),
      'Canopy beams that hang a load at their tip.',
    );
    await hand.fill(page.getByLabel('Do not use for'), 'End supports that cannot hold down.');
    await hand.fill(page.getByLabel('What is new and why'), 'First issue.');
    await hand.choose(page.getByLabel('Class of change'), 'improvement');
    await hand.choose(page.getByLabel('What is at stake'), 'safety');
  });

  await test.step('proven, and sent to review', async () => {
    await hand.press(main(page, 'Prove it'));
    await expect(page).toHaveURL(new RegExp(REVIEW));
    await expect(async () => {
      await page.reload();
      await expect(page.locator('#proof').getByText('Passed')).toBeVisible({ timeout: 500 });
    }).toPass({ timeout: 120_000 });
    await hand.press(main(page, 'Send to review'));
    await expect(page.getByText('Sent to review. Those who may review it are told.')).toBeVisible();
  });

  await test.step(`in no more than ${MOST} interactions`, async () => {
    expect(hand.count).toBeLessThanOrEqual(MOST);
    test.info().annotations.push({ type: 'interactions', description: String(hand.count) });
  });

  await test.step('the checker finds it on the desk, sees its proof, and issues it', async () => {
    const checker = await newPage(browser, baseURL, CHECKER);
    await checker.goto('/library');
    await checker.getByRole('row', { name: TITLE }).first().getByRole('link').first().click();
    await checker.goto(REVIEW);
    await expect(checker.locator('#proof').getByText('Passed')).toBeVisible();
    await main(checker, 'Issue').click();
    await expect(checker.getByText('Issued. It can be used from now on.')).toBeVisible();
    await checker.context().close();
  });

  await test.step('the engineer places it in a job and sees its results', async () => {
    const engineer = await newPage(browser, baseURL);
    await engineer.goto('/templates');
    await engineer.getByRole('searchbox').first().fill('two-span overhang tip');
    await engineer.goto(`/templates/${SLUG}`);
    await engineer
      .getByRole('link', { name: /Use in a job/ })
      .first()
      .click();
    await engineer
      .getByLabel('Job', { exact: true })
      .selectOption({ label: 'Q-2417 Larkfold School hall extension' });
    await engineer.getByLabel('Mark').fill(MARK);
    await engineer.getByRole('textbox', { name: 'Title' }).fill('Canopy beam with a sign at its tip');
    await engineer.getByLabel('Checked by').selectOption({ index: 1 });
    await engineer.getByRole('button', { name: 'Place it in the job' }).click();
    await expect(engineer.getByText('evaluated by the server')).toBeVisible({ timeout: 30_000 });
    await expect(engineer.locator('svg.drawing').first()).toContainText('kN');
    await engineer.context().close();
  });
});

test('the template is recalled: its owner is told, and the recall closes when the decision is recorded', async ({
  page,
  browser,
  baseURL,
}) => {
  test.setTimeout(240_000);
  await enter(page, baseURL, LIBRARIAN);
  const reason = `The load at the tip is left out of the reaction at C (${STAMP}).`;

  await test.step('withdrawn with a reason, and its one use in view', async () => {
    await page.goto(`${REVIEW}/withdraw`);
    await expect(page.getByRole('row', { name: MARK })).toContainText('Tomasz Brindle');
    await page.getByLabel('What is wrong').fill(reason);
    await page.getByLabel('What is at stake').selectOption('safety');
    await main(page, 'Withdraw and recall 1 use').click();
    await expect(page).toHaveURL(/\/library\/recalls\//);
    await expect(page.getByText('No decision yet')).toBeVisible();
    await expect(main(page, 'Close the recall')).toBeDisabled();
  });

  const engineer = await newPage(browser, baseURL);

  await test.step('its owner is told in the app and by e-mail', async () => {
    await engineer.goto('/notices');
    await expect(engineer.getByRole('row', { name: /recall/i }).first()).toContainText(reason);
    await expect(async () => {
      await engineer.goto('/demo-mail?to=brindle');
      await expect(engineer.frameLocator('iframe').getByText(reason).first()).toBeVisible({
        timeout: 500,
      });
    }).toPass();
  });

  await test.step('it is placed nowhere any more', async () => {
    const refused = await engineer.request.post('/api/v1/jobs/Q-2417/members', {
      data: { mark: `${MARK}X`, template: SLUG },
      headers: { origin: new URL(baseURL ?? '').origin },
    });
    expect(refused.status()).toBeGreaterThanOrEqual(400);
  });

  await test.step('the engineer decides by name', async () => {
    await engineer.goto('/library?mine=on');
    await engineer
      .getByRole('row', { name: new RegExp(String(STAMP)) })
      .getByRole('link')
      .first()
      .click();
    const use = engineer.getByRole('row', { name: MARK });
    await use.getByLabel(/What becomes of/).selectOption('accepted');
    await use.getByLabel('Why').fill('Worked by hand with the right reaction.');
    await use.getByRole('button', { name: 'Record the decision' }).click();
    await expect(use.getByText('Accepted as it stands').first()).toBeVisible();
    await expect(use).toContainText('Tomasz Brindle');
  });

  await test.step('then it closes', async () => {
    await page.reload();
    await expect(main(page, 'Close the recall')).toBeEnabled();
    await main(page, 'Close the recall').click();
    await expect(page.getByText(/^Closed by/)).toBeVisible();
  });
  await engineer.context().close();
});

/** By this page: what was only opened says no time. */
const SAVED = /^Saved \d+:\d+/;
const SHARED = `draft-of-two-${STAMP}`;

test('two people who edit one draft merge what both changed', async ({ page, browser, baseURL }) => {
  test.setTimeout(180_000);
  await enter(page, baseURL);
  await page.goto('/library/new-template');
  await page.getByLabel('Title', { exact: true }).fill('Draft of two people');
  await page.getByLabel('Address').fill(SHARED);
  await main(page, 'Begin the template').click();
  await isOpen(page);

  const other = await newPage(browser, baseURL, LIBRARIAN);
  await other.goto(`/library/template/${SHARED}/drafts/1`);
  await isOpen(other);

  await test.step('one changes a name and a kind of support', async () => {
    await other.getByLabel('Title', { exact: true }).fill('Theirs');
    await beamOf(other)
      .getByRole('option', { name: /^Support A/ })
      .click();
    await other.getByLabel('Kind', { exact: true }).first().selectOption('fixed');
    await expect(other.getByText(SAVED)).toBeVisible();
  });

  await test.step('the other, with the older draft, changes the name and a load', async () => {
    await page.getByLabel('Title', { exact: true }).fill('Mine');
    await page.getByRole('toolbar').getByRole('button', { name: 'Point load' }).click();
    await page.keyboard.press('Enter');
    await expect(page.getByText('Somebody else changed a place that you changed too.')).toBeVisible();
  });

  await test.step('only the name is to be decided; the rest of both is in', async () => {
    await expect(beamOf(page).getByRole('option', { name: /^Support A, fixed/ })).toBeVisible();
    await expect(beamOf(page).getByRole('option', { name: /^Point load P/ })).toBeVisible();
    await expect(page.getByRole('list', { name: 'Changed by both' }).getByRole('listitem')).toHaveCount(1);
    await page.getByRole('button', { name: /^Take yours/ }).click();
    await expect(page.getByText(SAVED)).toBeVisible();
  });

  await test.step('and who comes later finds all of it', async () => {
    await other.reload();
    await expect(other.getByLabel('Title', { exact: true })).toHaveValue('Mine');
    await expect(beamOf(other).getByRole('option', { name: /^Support A, fixed/ })).toBeVisible();
    await expect(beamOf(other).getByRole('option', { name: /^Point load P/ })).toBeVisible();
  });
  await other.context().close();
});

test.describe('the page of a draft', () => {
  test.use({ bypassCSP: true });

  test('is sound at every width, and its drawing is come to by the keys', async ({ page, baseURL }) => {
    test.setTimeout(180_000);
    await enter(page, baseURL);
    await page.goto(`/library/template/${SHARED}/drafts/1`);
    await isOpen(page);

    await test.step('a part is come to by Tab, its neighbour by an arrow', async () => {
      await tabTo(page, /^(Support|Line load|Dimension|Point load) /);
      await page.keyboard.press('Home');
      await page.keyboard.press('End');
      await expect(beamOf(page).getByRole('option', { selected: true })).toHaveCount(1);
    });

    await test.step('what is placed by the keys has the focus, and what is beside it when it is taken away', async () => {
      const options = beamOf(page).getByRole('option');
      const before = await options.count();
      const hinge = beamOf(page).getByRole('option', { name: /^Hinge/ });
      await page.getByRole('toolbar').getByRole('button', { name: 'Hinge' }).focus();
      await page.keyboard.press('Enter');
      await expect(page.getByRole('slider', { name: 'Where the hinge goes' })).toBeFocused();
      await page.keyboard.press('ArrowLeft');
      await page.keyboard.press('Shift+ArrowLeft');
      await page.keyboard.press('Enter');
      await expect(hinge).toBeFocused();
      await expect(hinge).toHaveAttribute('aria-selected', 'true');
      await page.keyboard.press('Delete');
      await expect(hinge).toHaveCount(0);
      await expect(beamOf(page).locator('[role=option]:focus')).toHaveCount(1);
      await page.keyboard.press('Control+z');
      await page.keyboard.press('Control+z');
      await expect(options).toHaveCount(before);
    });

    for (const width of WIDTHS) {
      await page.setViewportSize({ width, height: 1000 });
      await expectSound(page, `draft at ${width}`);
    }
  });
});
