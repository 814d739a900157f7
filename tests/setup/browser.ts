import { AxeBuilder } from '@axe-core/playwright';
import { type Browser, type BrowserContext, chromium, type Page } from 'playwright-core';

export const BASE = process.env.PUBLIC_URL ?? '';
export const PHONE = { width: 390, height: 844 } as const;
export const DESK = { width: 1440, height: 900 } as const;
export type Scheme = 'light' | 'dark';

export function openBrowser(): Promise<Browser> {
  return chromium.launch({
    executablePath: '/usr/bin/chromium',
    args: [
      '--no-sandbox',
      '--disable-gpu',
      '--disable-quic',
      '--no-first-run',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-sync',
    ],
  });
}

type Options = { viewport?: { width: number; height: number }; scheme?: Scheme; scripts?: boolean };

export function openContext(
  browser: Browser,
  { viewport = DESK, scheme = 'light', scripts = true }: Options = {},
): Promise<BrowserContext> {
  return browser.newContext({ baseURL: BASE, viewport, colorScheme: scheme, javaScriptEnabled: scripts });
}

export async function signIn(page: Page, email: string): Promise<void> {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password').fill('weepmark-demo');
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL('**/bench');
}

/** What axe finds wrong by WCAG 2.2 A and AA, in a line each. */
export async function violations(page: Page): Promise<string[]> {
  const { violations: found } = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'])
    .analyze();
  return found.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html.slice(0, 160)).join(' | ')}`);
}
