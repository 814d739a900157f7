import { expect, test } from 'vitest';
import { Forbidden, NotFound } from '#app/features/outcome.ts';
import {
  addCertificate,
  certificateSchema,
  listCertificates,
  removeCertificate,
} from '#app/features/people/certificates.server.ts';
import { makeShop } from '#tests/setup/people.ts';

const NOW = new Date('2026-12-01T12:00:00Z');

test('certificates are kept by the admin, and say when they run out', async () => {
  const [shop, far] = [await makeShop(), await makeShop()];
  const add = (name: string, expiresOn: string) =>
    addCertificate(shop.admin, shop.tech.userId, certificateSchema.parse({ name, expiresOn }));
  await add('past', '2026-11-30');
  await add('soon', '2026-12-20');
  await add('good', '2028-01-01');
  await add('for ever', '');
  const listed = await listCertificates(shop.shop.id, shop.tech.userId, NOW);
  expect(listed.map(({ name, state }) => [name, state])).toEqual([
    ['for ever', 'good'],
    ['past', 'expired'],
    ['soon', 'soon'],
    ['good', 'good'],
  ]);
  const input = certificateSchema.parse({ name: 'x' });
  await expect(addCertificate(shop.lead, shop.tech.userId, input)).rejects.toThrow(Forbidden);
  await expect(addCertificate(far.admin, shop.tech.userId, input)).rejects.toThrow(NotFound);
  await expect(removeCertificate(far.admin, shop.tech.userId, listed[0]?.id ?? 0)).rejects.toThrow(NotFound);
  expect((await removeCertificate(shop.admin, shop.tech.userId, listed[0]?.id ?? 0)).ok).toBe(true);
  expect(await listCertificates(shop.shop.id, shop.tech.userId, NOW)).toHaveLength(3);
});

test.each(['2026-13-40', 'soon', '1/2/2027'])('%j is no date', (expiresOn) => {
  expect(certificateSchema.safeParse({ name: 'x', expiresOn }).success).toBe(false);
});
