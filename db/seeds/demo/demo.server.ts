import { readFile } from 'node:fs/promises';
import path from 'node:path';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { hashPassword } from '#app/features/auth/passwords.server.ts';
import { importLineSchema } from '#app/features/case-import/schema.ts';
import { writeImportedCase } from '#app/features/case-import/write-case.server.ts';
import { judgeLikeness } from '#app/features/find/alike.server.ts';
import { storePhotoFromFile } from '#app/features/photos/store-from-file.server.ts';
import { Case, Certificate, Circuit, Machine, Shop, User, Yard } from '#db/models/index.ts';
import { closeImagePool } from '#storage/images.server.ts';
import { type Crew, type PlacedPhoto, seedLiveCases } from './live-cases.server.ts';
import { demoPassword, demoPeople, demoShops } from './people.ts';
import { IMPORTED_PHOTOS } from './photos.ts';
import { FARSIDE_CASES, PLATES } from './shops.ts';

const FOLDER = path.resolve(import.meta.dirname);
const DAY_MS = 24 * 60 * 60_000;
const YEAR_DAYS = 365.25;

/** Loads the invented plant shop, lived-in up to today, and a second small shop. */
export async function seedDemo(say: (text: string) => void): Promise<void> {
  const now = new Date();
  say('Loading the demo: people …');
  const people = await seedPeople(now);
  const person = (email: string): Actor => {
    const found = people.get(email);
    if (!found) throw new Error(`nobody in the demo has the address ${email}`);
    return found;
  };
  const crew: Crew = {
    rhedyn: person('tech@brackwater.example'),
    jesk: person('tech2@brackwater.example'),
    tamsel: person('lead@brackwater.example'),
    ottolie: person('office@brackwater.example'),
  };
  say('Loading the demo: four years of cases …');
  await seedImported(crew.tamsel, await readLines(path.join(FOLDER, 'cases.jsonl')), now);
  await seedImported(person('lead@farside.example'), FARSIDE_CASES, now);
  await seedPlates();
  await Yard.update({ altitudeM: 310 }, { where: { name: 'Cobbleshaw' } });
  await Certificate.bulkCreate([
    {
      shopId: crew.rhedyn.shopId,
      userId: crew.rhedyn.userId,
      name: 'shop certificate 14',
      expiresOn: new Date(now.getTime() + 400 * DAY_MS),
    },
    {
      shopId: crew.jesk.shopId,
      userId: crew.jesk.userId,
      name: 'shop certificate 17',
      expiresOn: new Date(now.getTime() + 20 * DAY_MS),
    },
  ]);
  const live = await seedLiveCases(crew, now);
  await seedLikenesses(crew.tamsel, now);
  say('Loading the demo: photos (half a minute) …');
  await seedPhotos([...live, ...(await importedPhotos(crew.rhedyn))], now);
  await closeImagePool();
}

async function seedPeople(now: Date): Promise<Map<string, Actor>> {
  const passwordHash = await hashPassword(demoPassword);
  const actors = new Map<string, Actor>();
  for (const [slug, name] of Object.entries(demoShops)) {
    const shop = await Shop.create({ name, slug, createdAt: now });
    for (const { name: personName, email, role } of demoPeople.filter((one) => one.shop === slug)) {
      const user = await User.create({
        shopId: shop.id,
        name: personName,
        email,
        role,
        passwordHash,
        createdAt: now,
      });
      actors.set(email, { userId: user.id, shopId: shop.id, role, name: personName });
    }
  }
  return actors;
}

async function readLines(file: string): Promise<unknown[]> {
  const text = await readFile(file, 'utf8');
  return text
    .trim()
    .split('\n')
    .map((line) => JSON.parse(line));
}

/** Whole years are added so that the newest record is less than a year old and its season stays. */
async function seedImported(actor: Actor, lines: unknown[], now: Date): Promise<void> {
  const cases = lines.map((line) => importLineSchema.parse(line));
  const newest = Math.max(...cases.map(({ openedAt }) => Date.parse(openedAt)));
  const years = Math.max(0, Math.floor((now.getTime() - newest) / (YEAR_DAYS * DAY_MS)));
  for (const line of cases) {
    const openedAt = new Date(line.openedAt);
    openedAt.setUTCFullYear(openedAt.getUTCFullYear() + years);
    openedAt.setUTCHours(8 + (openedAt.getUTCDate() % 8), (openedAt.getUTCDate() * 7) % 60);
    await writeImportedCase(actor, { ...line, openedAt: openedAt.toISOString() }, now);
  }
}

/** What stands on the plates of some machines, and where their ports hide. */
async function seedPlates(): Promise<void> {
  for (const { machine, place, ...plate } of PLATES) {
    const row = await Machine.findOne({ where: { number: machine } });
    const circuit = row && (await Circuit.findOne({ where: { machineId: row.id, place } }));
    await circuit?.update({ ...plate, plateChargeGrams: Number(plate.plateCharge), plateChargeUnit: 'g' });
  }
}

const ALIKE = [
  ['BW-1091', 'BW-1002', 'confirmed'],
  ['BW-1091', 'BW-1071', 'confirmed'],
  ['BW-1002', 'BW-1076', 'confirmed'],
  ['BW-1318', 'BW-1268', 'confirmed'],
  ['BW-1091', 'BW-1216', 'dismissed'],
] as const;

async function seedLikenesses(lead: Actor, now: Date): Promise<void> {
  const rows = await Case.findAll({ where: { shopId: lead.shopId, externalId: [...new Set(ALIKE.flat())] } });
  const numbers = new Map(rows.map(({ externalId, number }) => [externalId, number]));
  for (const [one, other, verdict] of ALIKE) {
    const number = numbers.get(one) ?? 0;
    await judgeLikeness({ actor: lead, number, otherNumber: numbers.get(other) ?? 0, verdict }, now);
  }
}

async function importedPhotos(actor: Actor): Promise<PlacedPhoto[]> {
  const placed: PlacedPhoto[] = [];
  for (const { externalId, link, photos } of IMPORTED_PHOTOS) {
    const row = await Case.findOne({ where: { shopId: actor.shopId, externalId }, rejectOnEmpty: true });
    for (const photo of photos)
      placed.push({ number: row.number, actor, link, photo, takenAt: row.openedAt });
  }
  return placed;
}

async function seedPhotos(placed: PlacedPhoto[], now: Date): Promise<void> {
  const waiting = [...placed];
  const work = async () => {
    for (let next = waiting.shift(); next; next = waiting.shift()) {
      const { number, actor, link, photo, takenAt } = next;
      const row = await Case.findOne({ where: { shopId: actor.shopId, number }, rejectOnEmpty: true });
      await storePhotoFromFile({
        actor,
        file: path.join(FOLDER, 'photos', photo.file),
        on: { caseId: row.id },
        link,
        role: photo.role,
        caption: photo.caption,
        capturedAt: takenAt,
        uploadedAt: new Date(Math.min(takenAt.getTime() + 600_000, now.getTime())),
      });
    }
  };
  await Promise.all([work(), work()]);
}
