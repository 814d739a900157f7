import type { CylinderKind } from '#app/domain/refrigerant-book/book.ts';
import { addCylinder, addMovement, reverseMovement } from '#app/features/refrigerant-book/commands.server.ts';
import { movementSchema } from '#app/features/refrigerant-book/schema.ts';
import { accepted, type Crew } from './live-cases.server.ts';

type HoursAgo = (hours: number) => Date;

function bookOf({ ottolie }: Crew, hoursAgo: HoursAgo) {
  return async (hours: number, fields: Record<string, unknown>) =>
    accepted(await addMovement(ottolie, movementSchema.parse({ unit: 'g', ...fields }), hoursAgo(hours))).id;
}

/** What stands in the store; one weight was typed wrongly, reversed and entered again. */
export async function seedCylinders(
  crew: Crew,
  hoursAgo: HoursAgo,
): Promise<{ full: number; recovery: number }> {
  const move = bookOf(crew, hoursAgo);
  const add = async (label: string, refrigerant: string, kind: CylinderKind) =>
    accepted(await addCylinder(crew.ottolie, { label, refrigerant, kind }, hoursAgo(2000))).id;
  const full = await add('Cylinder 5', 'R-134a', 'new');
  const recovery = await add('Recovery 2', 'R-134a', 'recovery');
  const cans = await add('Can box A', 'R-134a', 'can');
  const yf = await add('Cylinder 7', 'R-1234yf', 'new');
  const wrong = await move(1990, { kind: 'bought', cylinder: full, amount: '16.3', unit: 'kg' });
  accepted(await reverseMovement(crew.ottolie, wrong, 'Digits turned round on the sheet.', hoursAgo(1989)));
  await move(1989, {
    kind: 'bought',
    cylinder: full,
    amount: '13.6',
    unit: 'kg',
    note: 'Full, tare checked.',
  });
  await move(1900, { kind: 'bought', cylinder: cans, amount: '4080', note: 'Twelve cans of 340 g.' });
  await move(700, { kind: 'bought', cylinder: yf, amount: '5', unit: 'kg' });
  await move(300, { kind: 'opened', cylinder: full });
  return { full, recovery };
}

/** What the office did after the bench had drawn from the cylinders. */
export async function weighCylinders(crew: Crew, full: number, hoursAgo: HoursAgo): Promise<void> {
  await bookOf(crew, hoursAgo)(30, {
    kind: 'weighed',
    cylinder: full,
    amount: '12.43',
    unit: 'kg',
    note: 'Tare taken off. The hose keeps a little each time.',
  });
}
