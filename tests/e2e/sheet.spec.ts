import { expect, test } from '@playwright/test';
import { signInAs } from './support/demo';

test('the crew opens the sheet, loses signal, marks a field planted, and the mark arrives once when signal is back', async ({
  browser,
  baseURL,
}) => {
  const office = await browser.newContext({ baseURL });
  await signInAs(office, baseURL as string, 'manager');
  const plan = await office.newPage();
  await plan.goto('/plans');
  await plan.getByRole('row').filter({ hasText: 'agreed' }).getByRole('link').first().click();
  await plan.getByRole('button', { name: 'Make a link' }).click();
  const link = await plan.locator('a[href*="/sheet/"]').getAttribute('href');
  const path = new URL(link as string).pathname;

  const phone = await browser.newContext({ baseURL, viewport: { width: 390, height: 844 } });
  const sheet = await phone.newPage();
  await sheet.goto(path);
  await expect(sheet.getByRole('heading', { level: 1 })).toContainText('planting sheet');
  const fields = await sheet.getByRole('heading', { level: 2 }).count();
  expect(fields).toBeGreaterThan(0);
  // The worker has kept the page and its parts.
  await expect
    .poll(() => sheet.evaluate(async () => (await (await caches.open('hilum-sheet-1')).match(location.href)) !== undefined))
    .toBe(true);
  await sheet.waitForTimeout(1500);

  await phone.setOffline(true);
  await sheet.reload();
  await expect(sheet.getByRole('heading', { level: 2 })).toHaveCount(fields);
  await sheet.getByRole('button', { name: 'Mark planted' }).first().click();
  await sheet.getByLabel('Note').fill('Wet at the north end');
  await sheet.getByRole('button', { name: 'Planted', exact: true }).click();
  await expect(sheet.getByText('1 mark waits on this phone to be sent.')).toBeVisible();
  await sheet.reload();
  await expect(sheet.getByText('1 mark waits on this phone to be sent.')).toBeVisible();

  await phone.setOffline(false);
  await expect(sheet.getByText('1 mark waits')).toHaveCount(0, { timeout: 30_000 });
  await plan.reload();
  await expect(plan.getByText('Wet at the north end')).toHaveCount(1);
  await office.close();
  await phone.close();
});
