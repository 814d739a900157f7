import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { beforeAll, describe, expect, test } from 'vitest';
import { hashPassword } from '#app/features/auth/passwords.server.ts';
import { Session, SignInFailure, User } from '#db/models/index.ts';
import { login, type MadeShop, makeShop } from '#tests/setup/people.ts';
import { ORIGIN, visit } from '#tests/setup/site.ts';

let shop: MadeShop;
let email = '';
const PASSWORD = 'a good long password';

beforeAll(async () => {
  shop = await makeShop();
  const user = await User.findByPk(shop.tech.userId, { rejectOnEmpty: true });
  await user.update({ passwordHash: await hashPassword(PASSWORD) });
  email = user.email;
});

const signIn = (form: Record<string, string>, headers = {}) => visit('/sign-in', { form, headers });

describe('signing in', () => {
  test('the right password opens a session that the database knows and the cookie hides', async () => {
    const answer = await signIn({ email: email.toUpperCase(), password: PASSWORD });
    expect(answer.status).toBe(302);
    expect(answer.headers.get('Location')).toBe('/bench');
    const cookie = answer.headers.get('Set-Cookie') ?? '';
    expect(cookie).toMatch(/HttpOnly/);
    expect(cookie).toMatch(/SameSite=Lax/);
    expect(cookie).not.toMatch(/Secure/);
    expect(await Session.count({ where: { userId: shop.tech.userId } })).toBe(1);
  });

  test('the page that was asked for comes next, another site never does', async () => {
    const to = (address: string) =>
      visit(`/sign-in?to=${encodeURIComponent(address)}`, { form: { email, password: PASSWORD } });
    expect((await to('/cases/7')).headers.get('Location')).toBe('/cases/7');
    expect((await to('//evil.example')).headers.get('Location')).toBe('/bench');
    expect((await to('https://evil.example')).headers.get('Location')).toBe('/bench');
  });

  test('a wrong password and an unknown address get the same answer, and the address stays typed', async () => {
    const wrong = await signIn({ email, password: 'nope' });
    const unknown = await signIn({ email: 'nobody@nowhere.example', password: 'nope' });
    expect([wrong.status, unknown.status]).toEqual([400, 400]);
    const [one, two] = [await wrong.text(), await unknown.text()];
    expect(one).toContain('This address and password do not go together.');
    expect(two).toContain('This address and password do not go together.');
    expect(one).toContain(`value="${email}"`);
  });

  test('repeated failures slow it down, for the right password too; counted in the database', async () => {
    await SignInFailure.destroy({ where: {} });
    for (let tries = 0; tries < 6; tries += 1) await signIn({ email, password: `wrong ${tries}` });
    const answer = await signIn({ email, password: PASSWORD });
    expect(answer.status).toBe(400);
    expect(await answer.text()).toContain('Too many tries');
    await SignInFailure.destroy({ where: {} });
    expect((await signIn({ email, password: PASSWORD })).status).toBe(302);
  });

  test('twenty failures at once are all counted', async () => {
    await SignInFailure.destroy({ where: {} });
    await Promise.all(
      Array.from({ length: 5 }, (_, place) => signIn({ email: 'x@y.example', password: String(place) })),
    );
    const rows = await SignInFailure.findAll();
    expect(rows.map(({ failures }) => failures)).toEqual([5, 5]);
    await SignInFailure.destroy({ where: {} });
  });

  test('somebody who is not active stays out, at the door and with an old cookie', async () => {
    const cookie = await login(shop.office);
    expect((await visit('/bench', { as: cookie })).status).toBe(200);
    await User.update({ active: false }, { where: { id: shop.office.userId } });
    expect((await visit('/bench', { as: cookie })).status).toBe(302);
  });

  test('signing out ends the session in the database', async () => {
    const cookie = await login(shop.lead);
    expect((await visit('/sign-out', { as: cookie, method: 'POST', form: {} })).status).toBe(302);
    expect((await visit('/bench', { as: cookie })).status).toBe(302);
  });

  test('a forged cookie is nobody', async () => {
    expect((await visit('/bench', { as: 'weepmark_session=InRva2VuIg%3D%3D.forged' })).status).toBe(302);
  });
});

describe('a new password by mail', () => {
  test('the answer is the same for a stranger; the link works once and ends every session', async () => {
    const known = await visit('/forgot', { form: { email } });
    const unknown = await visit('/forgot', { form: { email: 'nobody@nowhere.example' } });
    expect([known.status, unknown.status]).toEqual([200, 200]);
    const cookie = await login(shop.tech);
    const link = await newestLink(email);
    expect((await visit(link)).status).toBe(200);
    const short = await visit(link, { form: { password: 'short', again: 'short' } });
    expect(await short.text()).toContain('at least 10 characters');
    const differ = await visit(link, { form: { password: 'another long one', again: 'another long two' } });
    expect(await differ.text()).toContain('The two passwords differ');
    const long = await visit(link, { form: { password: 'ä'.repeat(40), again: 'ä'.repeat(40) } });
    expect(await long.text()).toContain('72 bytes');
    const set = await visit(link, { form: { password: 'another long one', again: 'another long one' } });
    expect(set.status).toBe(302);
    expect((await visit('/bench', { as: cookie })).status).toBe(302);
    expect((await visit(link)).status).toBe(404);
    expect((await signIn({ email, password: 'another long one' })).status).toBe(302);
  });
});

async function newestLink(to: string): Promise<string> {
  const folder = process.env.MAILBOX_DIR ?? '';
  for (let tries = 0; tries < 50; tries += 1) {
    const mails = readdirSync(folder)
      .filter((name) => name.endsWith('.json'))
      .map((name) => JSON.parse(readFileSync(path.join(folder, name), 'utf8')))
      .filter((mail) => mail.to === to);
    const link = /https?:\/\/\S+/.exec(mails.at(-1)?.text ?? '')?.[0];
    if (link) return new URL(link).pathname;
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  throw new Error('no mail came');
}

describe('writes from elsewhere', () => {
  test.each<Record<string, string>>([
    { 'Sec-Fetch-Site': 'cross-site' },
    { 'Sec-Fetch-Site': 'same-site' },
    { Origin: 'https://evil.example' },
    { Origin: 'null' },
  ])('%j is refused, on resources and the API too', async (headers) => {
    const as = await login(shop.lead);
    for (const address of ['/scheme', '/resources/preview', '/api/v1/machines', '/resources/photos/upload']) {
      const { status } = await visit(address, { as, method: 'POST', form: { scheme: 'lamp' }, headers });
      expect(status).toBeGreaterThanOrEqual(400);
      expect(status).toBeLessThan(500);
    }
  });

  test('our own is taken', async () => {
    const headers = { 'Sec-Fetch-Site': 'same-origin', Origin: ORIGIN };
    expect((await visit('/scheme', { form: { scheme: 'lamp' }, headers })).status).toBe(302);
  });
});

describe('headers', () => {
  test('a page allows its own scripts by nonce only, and every script has it', async () => {
    const answer = await visit('/sign-in');
    const policy = answer.headers.get('Content-Security-Policy') ?? '';
    const nonce = /'nonce-([^']+)'/.exec(policy)?.[1];
    expect(nonce).toBeTruthy();
    expect(policy).toContain("frame-ancestors 'none'");
    expect(policy).not.toContain('unsafe');
    const scripts = (await answer.text()).match(/<script[^>]*>/g) ?? [];
    expect(scripts.length).toBeGreaterThan(0);
    expect(scripts.every((tag) => tag.includes(`nonce="${nonce}"`))).toBe(true);
    expect((await visit('/sign-in')).headers.get('Content-Security-Policy')).not.toBe(policy);
  });

  test.each(['/sign-in', '/healthz', '/nothing', '/api/v1/find'])(
    '%s has the usual ones',
    async (address) => {
      const { headers } = await visit(address);
      expect(headers.get('X-Content-Type-Options')).toBe('nosniff');
      expect(headers.get('X-Frame-Options')).toBe('DENY');
      expect(headers.get('Referrer-Policy')).toBe('same-origin');
      expect(headers.get('X-Request-Id')).toMatch(/^[0-9a-f-]{36}$/);
    },
  );
});
