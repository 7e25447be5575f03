import AxeBuilder from '@axe-core/playwright';
import { expect, test } from '@playwright/test';
import { signInAs } from './support/demo';
import { demoPages } from './support/pages';

const WIDTHS = [
  { width: 1440, height: 900 },
  { width: 390, height: 844 },
];

for (const size of WIDTHS) {
  test(`every page has a title and one heading, fits ${size.width} px and has no serious accessibility fault`, async ({
    browser,
    baseURL,
  }) => {
    test.setTimeout(600_000);
    const faults: string[] = [];
    const pages = await demoPages();
    for (const role of new Set(pages.map((one) => one.role))) {
      const context = await browser.newContext({ viewport: size, baseURL, reducedMotion: 'reduce' });
      if (role !== 'signed out') await signInAs(context, baseURL as string, role);
      const page = await context.newPage();
      let errors: string[] = [];
      page.on('pageerror', (error) => errors.push(`threw ${error.message}`));
      page.on('console', (message) => {
        if (message.type() === 'error' && !message.text().includes('404')) errors.push(`console: ${message.text()}`);
      });
      for (const { path } of pages.filter((one) => one.role === role)) {
        errors = [];
        const where = `${role} ${path} at ${size.width}`;
        const response = await page.goto(path, { waitUntil: 'load' });
        await page.waitForTimeout(400);
        if ((response?.status() ?? 0) >= 500) faults.push(`${where}: status ${response?.status()}`);
        if ((await page.locator('h1').count()) !== 1) faults.push(`${where}: ${await page.locator('h1').count()} h1`);
        if (!(await page.title()).includes('Hilum')) faults.push(`${where}: title "${await page.title()}"`);
        const over = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
        if (over > 0) faults.push(`${where}: scrolls sideways by ${over} px`);
        const axe = await new AxeBuilder({ page }).analyze();
        for (const fault of axe.violations.filter((one) => one.impact === 'serious' || one.impact === 'critical')) {
          faults.push(
            `${where}: ${fault.id} ${fault.nodes
              .map((node) => `${node.target}`)
              .slice(0, 3)
              .join(' | ')}`,
          );
        }
        faults.push(...errors.map((error) => `${where}: ${error}`));
      }
      await context.close();
    }
    expect(faults).toEqual([]);
  });
}
