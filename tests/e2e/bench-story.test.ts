import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { DESK, openBrowser, openContext, PHONE, signIn } from '#tests/setup/browser.ts';

let browser: Browser;
beforeAll(async () => {
  browser = await openBrowser();
});
afterAll(() => browser.close());

async function pageFor(email: string, viewport: { width: number; height: number }): Promise<Page> {
  const page = await (await openContext(browser, { viewport })).newPage();
  await signIn(page, email);
  return page;
}

const HOLD = Array.from({ length: 21 }, (_, minute) => `${minute} ${380 + (minute % 2)}`).join('\n');

test('recovery, repair, hold test, a charge refused and then allowed, and the inspector’s export', async () => {
  const tech = await pageFor('tech@brackwater.example', PHONE);
  const add = async (page: Page) => {
    await page.getByRole('button', { name: 'Add', exact: true }).last().click();
    await page.getByText('Added.').waitFor();
  };

  await tech.goto('/cases/new?machine=W04');
  await tech.getByLabel('What the operator said').fill('Warm since the weekend.');
  await tech.getByLabel('Circuit').selectOption('refrigerant:cab-front');
  await tech.getByRole('button', { name: 'Open the case' }).click();
  await tech.waitForURL(/\/cases\/\d+$/);
  const number = Number(tech.url().split('/').at(-1));

  for (const [kind, value, unit] of [
    ['standing-pressure', '68', 'psi'],
    ['ambient-temperature', '21', 'C'],
  ] as const) {
    await tech.goto(`/cases/${number}/readings`);
    const form = tech.locator('summary', { hasText: 'Add a reading' });
    if ((await tech.getByLabel('What was read').isVisible()) === false) await form.click();
    await tech.getByLabel('What was read').selectOption(kind);
    await tech.getByRole('textbox', { name: 'Reading, as the gauge shows it' }).fill(value);
    await tech.getByLabel('Unit of reading, as the gauge shows it').selectOption(unit);
    await add(tech);
  }
  await tech.getByText('Standing pressure: Liquid is still inside').waitFor();

  const holdTest = async () => {
    await tech.goto(`/cases/${number}/proof`);
    await tech.locator('summary', { hasText: 'Add a vacuum hold by its readings' }).click();
    await tech.getByLabel('Minutes and reading, a line each').fill(HOLD);
    await tech.getByRole('button', { name: 'Work it out and record it' }).click();
  };
  await holdTest();
  await tech.getByText('no entry says that it was taken out').waitFor();
  expect(await tech.getByLabel('Minutes and reading, a line each').inputValue()).toBe(HOLD);

  const charge = async (kind: string, grams: string, cylinder: string) => {
    await tech.goto(`/cases/${number}/charge`);
    const radio = tech.getByRole('radio', { name: kind });
    if ((await radio.isVisible()) === false)
      await tech.locator('summary', { hasText: 'Add what went in or came out' }).click();
    await radio.check();
    await tech.getByRole('textbox', { name: 'How much' }).fill(grams);
    const list = tech.getByLabel('From or into which cylinder or can');
    const label = await list.locator('option', { hasText: cylinder }).textContent();
    await list.selectOption({ label: label ?? '' });
    await tech.getByRole('button', { name: 'Add', exact: true }).click();
  };
  await charge('Taken out', '430', 'Recovery 2');
  await tech.getByText('Added.').waitFor();
  await charge('Put in', '1150', 'Cylinder 5');
  await tech
    .getByRole('alert')
    .filter({ hasText: 'No refrigerant goes in while the newest proof is missing' })
    .waitFor();
  await tech.getByText('The lead can pass this with a written reason.').waitFor();

  await tech.goto(`/cases/${number}/repair`);
  await tech.getByLabel('What was done').selectOption('reseal');
  await add(tech);
  await holdTest();
  await tech.getByText('Hold test recorded.').waitFor();
  await tech.getByRole('img', { name: /Hold curve/ }).waitFor();
  await charge('Put in', '1300', 'Cylinder 5');
  await tech.getByText('this would make 1300 g where the plate says 1150 g').waitFor();
  await charge('Put in', '1150', 'Cylinder 5');
  await tech.getByText('Added.').waitFor();
  await tech.getByRole('button', { name: 'The machine goes back to work' }).click();
  await tech.getByText('Back to work.').waitFor();

  const office = await pageFor('office@brackwater.example', DESK);
  await office.goto('/refrigerant');
  await office.getByText('The book balances').waitFor();
  await office.getByLabel('What happened').selectOption('weighed');
  const cylinders = office.getByLabel('Cylinder or can');
  const label = await cylinders.locator('option', { hasText: 'Recovery 2' }).textContent();
  await cylinders.selectOption({ label: label ?? '' });
  await office.getByRole('textbox', { name: 'Net weight on the scale' }).fill('965');
  await office.getByRole('button', { name: 'Enter it' }).click();
  await office.getByText('Entered in the book.').waitFor();
  await office.getByText('The book balances').waitFor();
  const csv = await (await office.request.get('/refrigerant/export.csv?machine=W04')).text();
  expect(csv).toMatch(new RegExp(`charged,R-134a,1150,,Cylinder 5,W04,[^,]+,? ?[^,]*,${number},`));
});
