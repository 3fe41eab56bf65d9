/** Every place of every role: nothing grave for accessibility, no sideways scroll at any width, one h1, no policy violation. */
import type { Role } from '@/shared/contract';
import { expect, expectAccessible, expectNoSidewaysScroll, signIn, test } from './support';

const PLACES: Record<Role, string[]> = {
  technician: ['/home', '/patients', '/patients/new', '/imports', '/about', '/method'],
  surgeon: ['/home', '/plans', '/plans?status=draft', '/lenses'],
  counsellor: ['/home', '/plans', '/patients'],
  nurse: ['/home', '/plans'],
  administrator: [
    '/home',
    '/lenses',
    '/lenses/new',
    '/lenses/import',
    '/accounts',
    '/accounts/invite',
    '/outbox',
    '/audit',
  ],
};

for (const [role, places] of Object.entries(PLACES) as [Role, string[]][]) {
  test(`${role}: every place is accessible and fits`, async ({ page }) => {
    await signIn(page, role);
    for (const place of places) {
      await page.goto(place);
      await expect(page.getByRole('heading', { level: 1 })).toHaveCount(1);
      await expect(page.locator('[aria-busy="true"]')).toHaveCount(0);
      await expectAccessible(page);
      await expectNoSidewaysScroll(page);
    }
  });
}

test('the eye, its plan and its measurement are accessible and fit, at 320 px too', async ({ page }) => {
  await signIn(page, 'surgeon', '/patients?search=D-0112');
  await page.getByRole('link', { name: /Lanternfield/ }).click();
  await page.getByRole('link', { name: 'Open the right eye' }).click();
  await expect(page.getByText(/Pattern of a swollen lens/)).toBeVisible();
  await expectAccessible(page);
  await page.getByRole('link', { name: 'Where each value came from' }).click();
  await expect(page.getByText('As it stood there').first()).toBeVisible();
  await expectAccessible(page);
  await page.goBack();
  await page.getByRole('button', { name: /Go on with the draft|Start a plan/ }).click();
  await expect(page.getByRole('button', { name: /closest/ })).toBeVisible();
  await expectAccessible(page);
  await expectNoSidewaysScroll(page);
  await page.setViewportSize({ width: 320, height: 700 });
  await expectNoSidewaysScroll(page);
});
