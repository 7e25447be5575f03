import { type Browser, expect, type Page, test } from '@playwright/test';
import { aFieldSquare, soilCsv, threeFieldsInUtm } from './support/main-job-files';

/**
 * The main job as three people, from a database that holds one manager: a rep sets up a variety, a grower brings in fields and soil
 * tests and compares picks, the rep proposes, the grower agrees, the rep takes the plan away as PDF and CSV.
 */
const MANAGER = { email: 'manager@northfork.example', password: 'plenty-of-rain-2027' };
const REP = { name: 'Rolf Rep', email: 'rolf@northfork.example', password: 'tall corn and short beans' };
const GROWER = { name: 'Gerda Grower', email: 'gerda@farm.example', password: 'forty acres by the creek' };

async function signIn(page: Page, who: { email: string; password: string }) {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(who.email);
  await page.getByLabel('Password', { exact: true }).fill(who.password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page).not.toHaveURL(/sign-in/);
}

async function newPage(browser: Browser): Promise<Page> {
  const context = await browser.newContext({
    baseURL: test.info().project.use.baseURL,
    viewport: { width: 1440, height: 900 },
    acceptDownloads: true,
  });
  return context.newPage();
}

/** The newest invitation in the manager's outbox, where mail is kept while no server sends it. */
async function invitationLink(manager: Page, email: string): Promise<string> {
  await manager.goto('/outbox');
  const mail = manager
    .locator('li, article, details, tr')
    .filter({ hasText: email })
    .filter({ hasText: /invitation\// })
    .first();
  const text = (await mail.textContent()) ?? '';
  const link = /\/invitation\/[\w-]+/.exec(text)?.[0];
  if (!link) throw new Error(`No invitation for ${email} in the outbox.`);
  return link;
}

async function openAccount(page: Page, link: string, who: { name: string; password: string }) {
  await page.goto(link);
  await page.getByLabel('Your name').fill(who.name);
  const passwords = page.locator('input[type=password]');
  await passwords.nth(0).fill(who.password);
  await passwords.nth(1).fill(who.password);
  await page.getByRole('button', { name: 'Open my account' }).click();
  await expect(page).not.toHaveURL(/invitation/);
}

async function addVariety(
  page: Page,
  variety: { code: string; maturity: string; bush: string; height: string; stand: string; units: string },
) {
  await page.goto('/line-up/new');
  await page.getByLabel('Code').fill(variety.code);
  await page.getByLabel('Relative maturity').fill(variety.maturity);
  await page.getByLabel('Height').selectOption(variety.height);
  await page.getByLabel('Bush type').selectOption(variety.bush);
  await page.getByLabel('Standability').fill(variety.stand);
  await page.getByLabel('Phytophthora field tolerance').fill('7');
  await page.getByLabel('glyphosate').check();
  await page.getByRole('button', { name: 'Add the variety' }).click();
  await expect(page.getByRole('heading', { level: 1, name: variety.code })).toBeVisible();
  await page.getByRole('button', { name: 'Add a lot' }).click();
  await page.getByLabel('Lot number').fill(`${variety.code.replace(/\D/g, '')}-1`);
  await page.getByLabel('Seeds per pound').fill('2800');
  await page.getByLabel('Germination').fill('90');
  await page.getByLabel('Units on hand').fill(variety.units);
  await page.getByRole('button', { name: 'Keep the lot' }).click();
  await expect(page.getByRole('cell', { name: variety.units })).toBeVisible();
}

test('a dealership does its main job, end to end, on real input', async ({ browser }) => {
  test.setTimeout(300_000);
  const manager = await newPage(browser);
  const rep = await newPage(browser);
  const grower = await newPage(browser);
  let planPath = '';

  await test.step('the manager invites a rep, and the rep opens the account', async () => {
    await signIn(manager, MANAGER);
    await manager.goto('/settings/people');
    const invitation = manager.locator('form').filter({ has: manager.getByRole('button', { name: 'Send the invitation' }) });
    await invitation.getByLabel('Role').selectOption('rep');
    await invitation.getByLabel('Name').fill(REP.name);
    await invitation.getByLabel('E-mail').fill(REP.email);
    await invitation.getByRole('button', { name: 'Send the invitation' }).click();
    await expect(manager.getByText(/invitation (is on its way|stands)|kept in the outbox|outbox/i).first()).toBeVisible();
    await openAccount(rep, await invitationLink(manager, REP.email), REP);
  });

  await test.step('the rep sets up varieties', async () => {
    await addVariety(rep, { code: 'NF 21B', maturity: '2.1', bush: 'bushy', height: 'medium', stand: '6', units: '400' });
    await addVariety(rep, { code: 'NF 23U', maturity: '2.3', bush: 'upright', height: 'short', stand: '8', units: '300' });
    await addVariety(rep, { code: 'NF 27T', maturity: '2.7', bush: 'medium', height: 'tall', stand: '5', units: '200' });
    await rep.goto('/line-up');
    await expect(rep.getByRole('row', { name: /NF 2/ })).toHaveCount(3);
  });

  await test.step('the rep makes an operation and invites its grower', async () => {
    await rep.goto('/growers');
    await rep
      .getByText(/Add an operation|New operation|Make an operation/)
      .first()
      .click();
    await rep.getByLabel('Name', { exact: true }).first().fill('Creekside Farm');
    await rep
      .getByRole('button', { name: /operation|Make|Add/i })
      .last()
      .click();
    await expect(rep.getByText('Creekside Farm').first()).toBeVisible();
    if (!/\/growers\/.+/.test(rep.url())) await rep.getByRole('link', { name: 'Creekside Farm' }).first().click();
    await expect(rep.getByRole('heading', { level: 1, name: 'Creekside Farm' })).toBeVisible();
    const invitation = rep.locator('form').filter({ has: rep.getByRole('button', { name: 'Send the invitation' }) });
    await invitation.getByLabel('Name').fill(GROWER.name);
    await invitation.getByLabel('E-mail').fill(GROWER.email);
    await invitation.getByRole('button', { name: 'Send the invitation' }).click();
    await expect(rep.getByText(/invitation (is on its way|stands)|kept in the outbox|outbox/i).first()).toBeVisible();
    await openAccount(grower, await invitationLink(manager, GROWER.email), GROWER);
  });

  await test.step('the grower brings in a zipped shapefile in UTM, checks every boundary, and keeps the good ones', async () => {
    await grower.goto('/fields/import');
    await grower.setInputFiles('input[type=file]', {
      name: 'fields.zip',
      mimeType: 'application/zip',
      buffer: threeFieldsInUtm(),
    });
    await expect(grower.getByText(/crossed itself/)).toBeVisible({ timeout: 30_000 });
    await expect(grower.getByLabel('Name of shape 1')).toHaveValue('Home Quarter');
    await expect(grower.getByRole('cell', { name: '159.85' })).toBeVisible();
    await grower.getByLabel('What to do with Bow Tie').selectOption('skip');
    await grower.getByRole('button', { name: 'Keep 2 fields' }).click();
    await expect(grower.getByText(/2 fields kept/).first()).toBeVisible({ timeout: 30_000 });
  });

  await test.step('the grower brings in soil tests from a laboratory', async () => {
    await grower.goto('/soil/import');
    await grower.setInputFiles('input[type=file]', { name: 'lab.csv', mimeType: 'text/csv', buffer: soilCsv() });
    await expect(grower.getByText(/Soil pH|pH/).first()).toBeVisible({ timeout: 30_000 });
    await grower.getByRole('button', { name: /^Keep/ }).first().click();
    await expect(grower.getByText(/kept/).first()).toBeVisible({ timeout: 30_000 });
  });

  await test.step('the grower says how the field is farmed', async () => {
    await grower.goto('/fields');
    await grower.getByRole('link', { name: 'Home Quarter' }).click();
    await grower.getByRole('link', { name: 'Change the facts' }).click();
    await grower.getByLabel('Planting date').fill('2027-05-08');
    await grower.getByLabel('Row width').fill('30');
    await grower.getByLabel('Yield goal').fill('62');
    await grower.getByLabel('Natural drainage').selectOption('somewhat poorly');
    await grower.getByLabel('Tiled').selectOption('yes');
    await grower.getByLabel('Last crop').fill('corn');
    await grower.getByRole('button', { name: 'Keep the facts' }).click();
    await expect(grower.getByText('Kept. The picks of this field are stale now')).toBeVisible();
  });

  await test.step('a server action scores every field; each pick opens its ledger', async () => {
    await grower.goto('/fields');
    await grower.getByRole('button', { name: 'Score the fields' }).click();
    await expect(grower.getByRole('row', { name: /Home Quarter/ })).toContainText(/NF 2\d\w/, { timeout: 30_000 });
    await grower.getByRole('link', { name: 'Home Quarter' }).click();
    const ledger = grower.getByRole('table', { name: /Ledger of NF/ });
    await expect(ledger).toBeVisible();
    const figures = (await ledger.locator('td:last-child').allTextContents()).map((text) => Number(text.replace('−', '-')));
    const expected = figures.pop() as number;
    const total = figures.reduce((sum, one) => sum + one, 0);
    // Every line is rounded to 0.1 on the screen.
    expect(Math.abs(total - expected)).toBeLessThan(0.05 * (figures.length + 1) + 1e-9);
  });

  await test.step('what-if recomputes in the browser, and the grower compares', async () => {
    const first = grower.locator('ol > li').first();
    const before = await first.textContent();
    await grower.getByRole('button', { name: 'What if…' }).first().click();
    await grower.getByLabel('Row width, in').selectOption('7.5');
    await expect.poll(() => first.textContent()).not.toBe(before);
    await grower.getByRole('button', { name: 'Back to the facts' }).click();
    await expect.poll(() => first.textContent()).toBe(before);
    await grower.getByRole('link', { name: /Compare the first/ }).click();
    await expect(grower.getByRole('heading', { name: /^Why not NF/ }).first()).toBeVisible();
    await expect(grower.getByRole('row', { name: /^Expected/ })).toBeVisible();
  });

  await test.step('the rep puts picks on the plan and proposes it', async () => {
    await rep.goto('/plans');
    await rep
      .getByRole('link', { name: /Creekside Farm/ })
      .first()
      .click();
    await expect(rep).toHaveURL(/\/plans\/.+\/2027/);
    planPath = new URL(rep.url()).pathname;
    await rep.getByRole('button', { name: /picks/i }).first().click();
    await expect(rep.getByRole('row', { name: /Home Quarter/ }).first()).toContainText(/NF 2/);
    await rep.getByText('Propose to grower').first().click();
    await rep.getByLabel('A word to the grower').fill('First picks. Tell me what you think.');
    await rep.getByRole('button', { name: 'Propose and hold the seed' }).click();
    await expect(rep.getByText(/proposed/i).first()).toBeVisible();
  });

  await test.step('the grower asks for a change, the rep proposes again, the grower agrees by name', async () => {
    await grower.goto(planPath);
    await grower.getByText('Ask for a change').first().click();
    await grower.getByLabel('What should change').fill('A thicker stand on the home quarter, please.');
    await grower.getByRole('button', { name: 'Ask for the change' }).click();
    await expect(grower.getByText(/change asked/i).first()).toBeVisible();
    await rep.goto(planPath);
    await expect(rep.getByText('A thicker stand on the home quarter, please.').first()).toBeVisible();
    await rep.getByText('Propose to grower').first().click();
    await rep.getByRole('button', { name: 'Propose and hold the seed' }).click();
    await expect(rep.getByText(/proposed/i).first()).toBeVisible();
    await grower.goto(planPath);
    await grower.getByText('Agree to the plan').first().click();
    await grower.getByLabel('Your full name').fill(GROWER.name);
    await grower.getByRole('button', { name: 'I agree to this plan' }).click();
    await expect(grower.getByText(/agreed/i).first()).toBeVisible();
  });

  await test.step('the rep takes the plan away as PDF and CSV', async () => {
    const [, , operationId, season] = planPath.split('/');
    for (const [format, start] of [
      ['pdf', '%PDF'],
      ['csv', ''],
    ] as const) {
      const response = await rep.request.get(`/api/v1/plans/${operationId}/${season}/export?format=${format}`);
      expect(response.status(), format).toBe(200);
      const body = await response.body();
      expect(body.toString('latin1').includes(start)).toBe(true);
      if (format === 'csv') expect(body.toString('utf8')).toContain('Home Quarter');
    }
  });

  await test.step('both got mail at each step', async () => {
    await manager.goto('/outbox');
    await expect(manager.getByText(GROWER.email).first()).toBeVisible();
    await expect(manager.getByText(REP.email).first()).toBeVisible();
  });

  expect(aFieldSquare.name).toBe('Home Quarter');
});
