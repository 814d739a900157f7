import path from 'node:path';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { BASE, DESK, openBrowser, openContext, PHONE, signIn } from '#tests/setup/browser.ts';

let browser: Browser;
const PHOTO = path.resolve('db/seeds/demo/photos/flare-nut-uv.jpg');
const faults: string[] = [];

beforeAll(async () => {
  browser = await openBrowser();
});
afterAll(() => browser.close());

async function pageFor(email: string, viewport: { width: number; height: number }): Promise<Page> {
  const context = await openContext(browser, { viewport });
  const page = await context.newPage();
  page.on('pageerror', (error) => faults.push(String(error)));
  page.on('console', (message) => {
    if (message.type() === 'error' && !message.text().includes('status of 4')) faults.push(message.text());
  });
  await signIn(page, email);
  return page;
}

test('from the complaint on a phone to a published note, which another shop never sees', async () => {
  const tech = await pageFor('tech@brackwater.example', PHONE);

  await tech.getByRole('link', { name: 'New case' }).click();
  await tech.getByRole('combobox', { name: 'Machine' }).fill('W06');
  await tech
    .getByLabel('What the operator said')
    .fill('Goes warm climbing the ramp, snow white hands at the wheel by ten.');
  await tech.getByLabel('Narrow down symptoms').fill('not cold');
  await tech.getByRole('checkbox', { name: 'Not cold', exact: true }).check();
  await tech.getByRole('region', { name: 'Alike solved cases' }).getByRole('listitem').first().waitFor();
  await tech.getByLabel('Circuit').selectOption({ index: 1 });
  await tech.getByRole('button', { name: 'Open the case' }).click();
  await tech.waitForURL(/\/cases\/\d+$/);
  const number = Number(tech.url().split('/').at(-1));

  await tech.goto(`/cases/${number}/trace`);
  await tech.locator('summary', { hasText: 'Add a method' }).click();
  await tech.getByLabel('Method', { exact: true }).selectOption('uv-dye');
  await tech.getByRole('radio', { name: 'Showed the leak' }).check();
  await tech.getByRole('button', { name: 'Add', exact: true }).first().click();
  await tech.getByText('Added.').waitFor();

  const chooser = tech.waitForEvent('filechooser');
  await tech.getByRole('button', { name: 'Choose photos' }).click();
  await (await chooser).setFiles(PHOTO);
  await tech.locator('#photos figure img').waitFor();
  await expect
    .poll(() => tech.locator('#photos figure img').evaluate((image: HTMLImageElement) => image.naturalWidth))
    .toBe(320);

  await tech.getByRole('link', { name: 'Expansion valve' }).click();
  await expect.poll(() => tech.getByLabel('Part', { exact: true }).inputValue()).toBe('expansion-valve');
  await tech.getByRole('radio', { name: 'Confirmed' }).check();
  await tech.getByLabel('How it failed').selectOption('cracked');
  await tech.getByLabel('Why it failed').selectOption('missing-support');
  await tech.getByLabel('Where exactly').fill('Flare nut at the inlet, cracked across two flats');
  await tech.getByRole('button', { name: 'Add', exact: true }).last().click();
  await tech.getByText('Expansion valve, cracked').first().waitFor();
  await tech.getByRole('link', { name: 'Expansion valve, finding here' }).waitFor();

  await tech.goto(`/cases/${number}/repair`);
  await tech.getByLabel('What was done').selectOption('replace-part');
  await tech.getByRole('button', { name: 'Add', exact: true }).click();
  await tech.getByText('Replace the part').first().waitFor();

  const peer = await pageFor('tech2@brackwater.example', DESK);
  await peer.goto('/find');
  await peer.getByLabel('What was it like?').fill('txv fractured, blows warm');
  await peer.getByRole('button', { name: 'Find' }).click();
  await peer.waitForURL(/\/find\?.*q=/);
  await peer
    .getByRole('listitem')
    .filter({ hasText: `Case ${number}` })
    .first()
    .waitFor();

  const lead = await pageFor('lead@brackwater.example', DESK);
  await lead.goto(`/cases/${number}/write-up`);
  await lead.getByLabel('Title').fill('A valve nut cracks where its pipe may swing');
  await lead
    .getByLabel('The note')
    .fill('### What it did\n\nWarm uphill.\n\n### Why it failed\n\nThe clamp was **gone**.');
  await lead.getByRole('region', { name: 'Preview' }).locator('strong', { hasText: 'gone' }).waitFor();
  await lead.getByRole('checkbox', { name: 'UV' }).check();
  await lead.getByRole('button', { name: 'Publish', exact: true }).click();
  await lead.getByText('no proof is on record').first().waitFor();
  expect(await lead.getByRole('alert').textContent()).toContain('Refused');
  expect(await lead.getByLabel('The note').inputValue()).toContain('The clamp was **gone**.');

  await tech.goto(`/cases/${number}/proof`);
  await tech.getByLabel('How it was tested').fill('Vacuum hold after dry nitrogen');
  await tech.getByLabel('For how many minutes').fill('40');
  await tech.getByRole('radio', { name: /^Tight/ }).check();
  await tech.getByRole('button', { name: 'Add', exact: true }).click();
  await tech.getByText('Added.').waitFor();

  await lead.getByRole('button', { name: 'Publish', exact: true }).click();
  await lead.waitForURL(/\/write-ups\/a-valve-nut/);
  await lead.getByRole('heading', { name: 'A valve nut cracks where its pipe may swing' }).waitFor();
  expect(await lead.locator('main img').count()).toBe(1);

  const far = await pageFor('lead@farside.example', DESK);
  for (const address of [`/cases/${number}`, `/cases/${number}/trace`, new URL(lead.url()).pathname]) {
    expect((await far.goto(address))?.status()).toBe(404);
  }
  await far.goto('/find?q=valve+nut+cracks');
  expect(await far.getByText('A valve nut cracks').count()).toBe(0);
  const photo = await tech.request.get(`/cases/${number}/print`);
  const src = /\/photos\/\d+\/medium/.exec(await photo.text())?.[0] ?? '';
  expect((await lead.request.get(`${BASE}${src}`)).status()).toBe(200);
  expect((await far.request.get(`${BASE}${src}`)).status()).toBe(404);
  expect(faults).toEqual([]);
});
