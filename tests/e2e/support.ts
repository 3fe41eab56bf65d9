/**
 * What every journey shares: a page that fails the test on any content-security violation or uncaught
 * error, sign-in as a demo role, and the accessibility check.
 */
import { AxeBuilder } from '@axe-core/playwright';
import { test as base, expect } from '@playwright/test';
import type { Page } from '@playwright/test';
import type { Practice, Role } from '@/shared/contract';

export { expect };

export const test = base.extend<{ page: Page }>({
  page: async ({ page }, provide) => {
    const complaints: string[] = [];
    page.on('console', (message) => {
      if (/content security policy/i.test(message.text())) complaints.push(message.text());
    });
    page.on('pageerror', (error) => complaints.push(String(error)));
    await provide(page);
    expect(complaints).toEqual([]);
  },
});

/** E-mail and password of the demo account that holds the role, as the product itself publishes them. */
export async function demoAccount(page: Page, role: Role): Promise<{ email: string; password: string }> {
  const response = await page.request.get('/api/practice');
  const practice = (await response.json()) as Practice;
  const account = practice.demoAccounts.find((a) => a.roles.includes(role));
  if (!account) throw new Error(`No demo account holds the role ${role}`);
  return account;
}

/** Signs in through the form; ends on the page that `path` names. */
export async function signIn(
  page: Page,
  role: Role,
  path = '/',
): Promise<{ email: string; password: string }> {
  const account = await demoAccount(page, role);
  await page.goto(path);
  await page.getByLabel('E-mail').fill(account.email);
  await page.getByLabel('Password', { exact: true }).fill(account.password);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await expect(page).not.toHaveURL(/sign-in/);
  return account;
}

/** Nothing serious or critical by WCAG 2.2 A and AA. */
export async function expectAccessible(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'])
    .analyze();
  const grave = violations.filter((v) => v.impact === 'serious' || v.impact === 'critical');
  expect(grave.map((v) => `${v.id}: ${v.nodes.map((n) => n.target.join(' ')).join(' | ')}`)).toEqual([]);
}

/** No page may scroll sideways, at any width. */
export async function expectNoSidewaysScroll(page: Page): Promise<void> {
  const overflow = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
  expect(overflow).toBeLessThanOrEqual(0);
}
