/** What a new user does first: import, answer, plan, sign, print, read. Each project takes an eye of its own. */
import type { Page } from '@playwright/test';
import { demoAccount, expect, signIn, test } from './support';

const NEWCOMER: Record<string, string> = { phone: 'D-0301', wide: 'D-0302' };

async function signOut(page: Page): Promise<void> {
  await page.goto('/about');
  await page.getByRole('main').getByRole('button', { name: 'Sign out' }).click();
  await expect(page).toHaveURL(/sign-in/);
}

async function openNewcomer(page: Page, record: string): Promise<void> {
  await page.goto(`/patients?search=${record}`);
  await expect(page.getByText('1 patient', { exact: true })).toBeVisible();
  await page.getByRole('link', { name: /,/ }).first().click();
  await page.getByRole('link', { name: 'Open the right eye' }).click();
  await expect(page.getByRole('heading', { level: 1, name: 'Right eye' })).toBeVisible();
}

test('imports a file, plans an eye, signs, prints and reads it', async ({ page }, { project }) => {
  const record = NEWCOMER[project.name] ?? 'D-0303';

  await test.step('the technician imports the demo file', async () => {
    await signIn(page, 'technician', '/imports');
    const download = page.waitForEvent('download');
    await page.getByRole('button', { name: 'Download the demo file' }).click();
    const path = await (await download).path();
    const chooser = page.waitForEvent('filechooser');
    await page.getByRole('button', { name: 'Choose a file' }).click();
    await (await chooser).setFiles(path);
    await expect(page.getByText(/axial_length_mm "2358"/)).toBeVisible();
    const store = page.getByRole('button', { name: /^Store/ });
    await expect(store).toBeVisible();
    // The second project finds everything stored already: importing twice changes nothing.
    if (await store.isEnabled()) await store.click();
    else await expect(store).toHaveAccessibleName(/^Store 0 measurements/);
  });

  await test.step('and answers what the calculation needs to know', async () => {
    await openNewcomer(page, record);
    await page.getByRole('button', { name: 'Answer or correct' }).click();
    await page
      .getByRole('radiogroup', { name: /Did this cornea have surgery/ })
      .getByRole('radio', { name: 'No', exact: true })
      .click();
    await page.getByRole('radio', { name: 'Natural lens', exact: true }).click();
    await page.getByRole('radio', { name: 'Vitreous', exact: true }).click();
    await page.getByRole('button', { name: 'Save the history' }).click();
    await expect(page.getByRole('region', { name: 'Where this eye stands' })).toContainText(
      'Waits for a plan',
    );
    await signOut(page);
  });

  await test.step('the surgeon chooses a power by keyboard and signs', async () => {
    const { password } = await signIn(page, 'surgeon');
    await openNewcomer(page, record);
    await page.getByRole('button', { name: 'Start a plan' }).click();
    const closest = page.getByRole('button', { name: /closest/ });
    await closest.focus();
    await page.keyboard.press('ArrowUp');
    await page.keyboard.press('ArrowDown');
    await expect(closest).toBeFocused();
    await page.keyboard.press('Enter');
    await expect(closest).toHaveAttribute('aria-pressed', 'true');
    await page.getByRole('button', { name: 'Sign this plan' }).click();
    const dialog = page.getByRole('dialog');
    await dialog.getByRole('radio', { name: 'Right eye' }).click();
    for (const box of await dialog.getByRole('checkbox').all()) await box.click();
    await dialog.getByLabel('Your password').fill(password);
    await dialog.getByRole('button', { name: 'Sign for the right eye' }).click();
    await expect(page.getByText('Digest of everything signed:')).toBeVisible();
  });

  await test.step('and prints the sheet', async () => {
    const download = page.waitForEvent('download');
    await page.getByRole('button', { name: 'Plan sheet, A4' }).click();
    expect((await download).suggestedFilename()).toContain(record);
    await signOut(page);
  });

  await test.step('the counsellor reads it in plain words', async () => {
    await signIn(page, 'counsellor', `/plans?search=${record}`);
    await expect(page.getByText(/Right eye: monofocal lens .*power \+\d/)).toBeVisible();
    await page.getByRole('link', { name: /,/ }).first().click();
    await expect(page.getByRole('region', { name: 'Signed choice' })).toContainText('RIGHT EYE');
    await expect(page.getByRole('button', { name: 'Plan this eye again' })).toHaveCount(0);
  });
});

test('comes back to the wanted address after sign-in, reload, Back and Forward', async ({ page }) => {
  await signIn(page, 'surgeon', '/patients?search=D-0107');
  await expect(page).toHaveURL(/\/patients\?search=D-0107$/);
  await page.getByRole('link', { name: /Gullhaven/ }).click();
  await expect(page.getByRole('heading', { level: 1, name: /Gullhaven/ })).toBeVisible();
  await page.reload();
  await expect(page.getByRole('heading', { level: 1, name: /Gullhaven/ })).toBeVisible();
  await page.goBack();
  await expect(page.getByText('1 patient', { exact: true })).toBeVisible();
  await page.goForward();
  await expect(page.getByRole('heading', { level: 1, name: /Gullhaven/ })).toBeVisible();
});

test('refuses a wrong password and says so', async ({ page }) => {
  const { email } = await demoAccount(page, 'nurse');
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password', { exact: true }).fill('not the password at all');
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await expect(page.getByRole('alert')).toContainText('do not match');
});
