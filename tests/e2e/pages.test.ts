import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import {
  DESK,
  openBrowser,
  openContext,
  PHONE,
  type Scheme,
  signIn,
  violations,
} from '#tests/setup/browser.ts';

let browser: Browser;

beforeAll(async () => {
  browser = await openBrowser();
});
afterAll(() => browser.close());

const OPEN_PAGES = ['/', '/sign-in', '/forgot', '/mailbox', '/reset/spent', '/nothing-here'];
const CASE = '/cases/1152';
const SHOP_PAGES: [string, string[]][] = [
  [
    'tech@brackwater.example',
    [
      '/bench',
      '/find?q=blows+warm',
      '/find?q=zzzzzz',
      '/cases',
      '/cases/new',
      CASE,
      `${CASE}/complaint`,
      `${CASE}/readings`,
      `${CASE}/trace`,
      `${CASE}/trace?part=condenser`,
      `${CASE}/repair`,
      `${CASE}/proof`,
      `${CASE}/charge`,
      `${CASE}/write-up`,
      `${CASE}/history`,
      `${CASE}/print`,
      '/machines',
      '/machines/new',
      '/write-ups',
      '/refrigerant',
      '/refrigerant/record',
      '/reference',
      '/reference/pressures?refrigerant=R-407C',
      '/reference/hold-test',
      '/reference/charge?low=18&high=300',
      '/reference/leak-rate?added=150&days=120&year=300',
      '/reference/vacuum?altitude=1500',
      '/reference/cautions',
      '/reference/glossary',
      '/settings',
      '/people',
    ],
  ],
  ['admin@brackwater.example', ['/people', '/settings/catalogue', '/machines/import']],
];

describe.each(['light', 'dark'] as Scheme[])('in the %s scheme', (scheme) => {
  test.each([
    ['phone', PHONE],
    ['desk', DESK],
  ])(
    'axe finds nothing wrong on any page, and nothing runs off the edge, on a %s',
    async (_name, viewport) => {
      const found: string[] = [];
      const look = async (page: Awaited<ReturnType<typeof openPage>>, address: string) => {
        await page.goto(address);
        for (const violation of await violations(page)) found.push(`${address} ${violation}`);
        const over = await page.evaluate(
          () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
        );
        if (over > 0) found.push(`${address} is ${over} px too wide`);
      };
      const openPage = async () => (await openContext(browser, { viewport, scheme })).newPage();
      const open = await openPage();
      for (const address of OPEN_PAGES) await look(open, address);
      for (const [email, addresses] of SHOP_PAGES) {
        const page = await openPage();
        await signIn(page, email);
        for (const address of addresses) await look(page, address);
        await page.context().close();
      }
      expect(found).toEqual([]);
    },
  );
});

test('without scripts a case is opened, traced, and a wrong form keeps what was typed', async () => {
  const context = await openContext(browser, { viewport: PHONE, scripts: false });
  const page = await context.newPage();
  await signIn(page, 'tech@brackwater.example');
  await page.goto('/cases/new');
  await page.getByLabel('What the operator said').fill('Hissing by the step since this morning.');
  await page.getByRole('button', { name: 'Open the case' }).click();
  await page.getByRole('alert').waitFor();
  expect(await page.getByLabel('What the operator said').inputValue()).toBe(
    'Hissing by the step since this morning.',
  );
  await page.getByRole('combobox', { name: 'Machine' }).fill('W06');
  await page.getByLabel('Circuit').selectOption('refrigerant:cab-front');
  await page.getByRole('button', { name: 'Open the case' }).click();
  await page.waitForURL(/\/cases\/\d+$/);
  await page.goto(`${page.url()}/trace`);
  await page.getByRole('link', { name: 'Suction hose' }).click();
  expect(await page.getByLabel('Part', { exact: true }).inputValue()).toBe('suction-hose');
  await page.getByRole('radio', { name: 'Suspected' }).check();
  await page.getByRole('button', { name: 'Add', exact: true }).last().click();
  await page.getByText('Added.').waitFor();
  await page.getByLabel(/^Photos \(JPEG/).setInputFiles('db/seeds/demo/photos/gauge-deep-vacuum.jpg');
  await page.getByRole('button', { name: 'Add the photos' }).click();
  await page.getByText('1 photo added.').waitFor();
  await context.close();
});

test('two people at the same complaint: the second is told and loses nothing', async () => {
  const [one, two] = await Promise.all([openContext(browser), openContext(browser)]);
  const [first, second] = [await one.newPage(), await two.newPage()];
  await signIn(first, 'tech@brackwater.example');
  await signIn(second, 'lead@brackwater.example');
  for (const page of [first, second]) await page.goto(`${CASE}/complaint`);
  await first.getByLabel('What the operator said').fill('The first one’s words.');
  await second.getByLabel('What the operator said').fill('The second one’s words.');
  await first.getByRole('button', { name: 'Save the complaint' }).click();
  await first.getByText('Complaint saved.').waitFor();
  await second.getByRole('button', { name: 'Save the complaint' }).click();
  await second.getByText('Rhedyn changed this while you were writing').waitFor();
  await second.getByText('The first one’s words.').waitFor();
  expect(await second.getByLabel('What the operator said').inputValue()).toBe('The second one’s words.');
  await second.getByRole('button', { name: 'Save the complaint' }).click();
  await second.getByText('Complaint saved.').waitFor();
  expect(await second.getByLabel('What the operator said').inputValue()).toBe('The second one’s words.');
  await one.close();
  await two.close();
});
