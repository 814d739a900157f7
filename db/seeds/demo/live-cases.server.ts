import type { LinkKey } from '#app/domain/chain/chain.ts';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { addComment, parkCase, returnToWork, saveNotes } from '#app/features/cases/commands.server.ts';
import { addEntry } from '#app/features/cases/entries.server.ts';
import { addHoldTest } from '#app/features/cases/hold-tests.server.ts';
import { openCase } from '#app/features/cases/open-case.server.ts';
import type { EntryInput, EntryKind, OpenCaseInput } from '#app/features/cases/schema.ts';
import { openCaseSchema } from '#app/features/cases/schema.ts';
import type { Outcome } from '#app/features/outcome.ts';
import { saveWriteUp, sendBackWriteUp, submitWriteUp } from '#app/features/write-ups/commands.server.ts';
import { seedCylinders, weighCylinders } from './live-book.server.ts';
import { talkOnImported } from './live-talk.server.ts';
import { type DemoPhoto, GAUGES, PAIRS } from './photos.ts';

export type Crew = { rhedyn: Actor; jesk: Actor; tamsel: Actor; ottolie: Actor };
export type PlacedPhoto = { number: number; actor: Actor; link: LinkKey; photo: DemoPhoto; takenAt: Date };

const HOUR_MS = 60 * 60_000;

/** A value that must have been accepted: the demo takes the same way as a person does. */
export function accepted<T>(outcome: Outcome<T>): T {
  if (!outcome.ok) throw new Error(`the demo was refused: ${JSON.stringify(outcome)}`);
  return outcome.value;
}

/** The cases that are on the bench today, in every state, opened over the last weeks. */
export async function seedLiveCases(crew: Crew, now: Date): Promise<PlacedPhoto[]> {
  const { rhedyn, jesk, tamsel, ottolie } = crew;
  const photos: PlacedPhoto[] = [];
  const hoursAgo = (hours: number) => new Date(now.getTime() - hours * HOUR_MS);
  const open = async (
    actor: Actor,
    hours: number,
    input: Partial<OpenCaseInput> & { machine: string; circuit: string },
  ) =>
    accepted(
      await openCase(
        actor,
        openCaseSchema.parse({ ...input, hours: input.hours ? String(input.hours) : '' }),
        hoursAgo(hours),
      ),
    ).number;
  const add = async <K extends EntryKind>(
    actor: Actor,
    number: number,
    hours: number,
    kind: K,
    input: EntryInput<K>,
  ) => accepted(await addEntry({ actor, number, kind, input, at: hoursAgo(hours) }));
  const place = (actor: Actor, number: number, link: LinkKey, hours: number, shown: readonly DemoPhoto[]) => {
    for (const photo of shown) photos.push({ number, actor, link, photo, takenAt: hoursAgo(hours) });
  };

  const cylinders = await seedCylinders(crew, hoursAgo);

  const fresh = await open(rhedyn, 2, {
    machine: 'T05',
    circuit: 'refrigerant:cab-front',
    complaint: 'Mists up since yesterday, lad says it blew cold in the summer. Comp clicks now and then.',
    symptoms: ['glass-fogs', 'clutch-short-cycling'],
    weather: 'drizzle',
    ambient: '7',
    ambientUnit: 'C',
    hours: 4310,
  });
  await add(rhedyn, fresh, 1.5, 'reading', {
    kind: 'standing-pressure',
    value: '1.8',
    unit: 'bar',
    note: 'both sides, engine cold',
  });
  place(rhedyn, fresh, 'readings', 1.5, [GAUGES.standing]);

  const found = await open(jesk, 27, {
    machine: 'W07',
    circuit: 'refrigerant:cab-front',
    complaint: 'gone warm again, gassed in august. screen wont clear in the mornings',
    symptoms: ['regas-again', 'blows-warm'],
    weather: 'dry and cold',
    ambient: '4',
    ambientUnit: 'C',
    hours: 6120,
  });
  await add(jesk, found, 26, 'reading', { kind: 'standing-pressure', value: '28', unit: 'psi', note: '' });
  await add(jesk, found, 26, 'reading', { kind: 'ambient-temperature', value: '4', unit: 'C', note: '' });
  await add(jesk, found, 25, 'method', {
    methodId: 'electronic-detector',
    outcome: 'unclear',
    note: 'too much wind in the yard',
  });
  await add(jesk, found, 24, 'method', {
    methodId: 'uv-dye',
    outcome: 'found',
    note: 'dye from august still in it, lit up at once',
  });
  await add(jesk, found, 24, 'finding', {
    componentId: 'compressor-shaft-seal',
    failureModeId: 'shaft-seal-wear',
    mechanismId: '',
    causeId: 'standing',
    certainty: 'confirmed',
    place: 'behind the clutch hub, six o’clock',
    why: 'Stood from April to August with the belt on.',
  });
  await add(jesk, found, 24, 'finding', {
    componentId: 'pressure-switch',
    failureModeId: '',
    mechanismId: '',
    causeId: '',
    certainty: 'ruled-out',
    place: 'liquid line',
    why: 'Dry under the lamp.',
  });
  place(jesk, found, 'trace', 24, [...PAIRS.clutch, ...PAIRS.drySwitch]);
  accepted(
    await addComment(
      { actor: tamsel, number: found },
      'Order the seal kit with the hub puller, the old one is bent.',
      hoursAgo(20),
    ),
  );

  const repaired = await open(rhedyn, 75, {
    machine: 'L03',
    circuit: 'refrigerant:cab-front',
    complaint: 'No cold at all since it came back from the wash. He heard it hiss by the bulkhead.',
    symptoms: ['blows-warm', 'hiss-after-stop', 'no-standing-pressure'],
    weather: 'overcast',
    ambient: '9',
    ambientUnit: 'C',
    hours: 9870,
  });
  await add(rhedyn, repaired, 74, 'reading', {
    kind: 'standing-pressure',
    value: '0',
    unit: 'bar',
    note: '',
  });
  await add(rhedyn, repaired, 74, 'reading', {
    kind: 'ambient-temperature',
    value: '9',
    unit: 'C',
    note: '',
  });
  await add(rhedyn, repaired, 73, 'method', {
    methodId: 'nitrogen-pressure',
    outcome: 'found',
    note: '8 bar, ears found it',
  });
  await add(rhedyn, repaired, 72, 'finding', {
    componentId: 'expansion-valve',
    failureModeId: 'cracked',
    mechanismId: 'fatigue',
    causeId: 'missing-support',
    certainty: 'confirmed',
    place: 'flare nut at the valve inlet, cracked across two flats',
    why: 'The clamp on the liquid line is gone, so the pipe shakes on its nut.',
  });
  place(rhedyn, repaired, 'trace', 72, PAIRS.flareNut);
  await add(rhedyn, repaired, 50, 'repair', {
    actionId: 'replace-part',
    componentId: 'expansion-valve',
    partNumber: '',
    because: 'failed',
    note: 'New nut and flare, new clamp with rubber.',
  });
  await add(rhedyn, repaired, 50, 'repair', {
    actionId: 'replace-drier',
    componentId: 'receiver-drier',
    partNumber: '',
    because: 'opened',
    note: 'It was open for two days.',
  });

  accepted(
    await saveWriteUp(
      { actor: rhedyn, number: repaired },
      {
        title: 'A clamp that is gone cracks the nut',
        body: 'Started while it is fresh.\n\n- liquid line shakes, nut cracks across two flats\n- clamp was missing since the wash',
        photos: [],
        version: undefined,
      },
      hoursAgo(49),
    ),
  );

  const parked = await open(jesk, 170, {
    machine: 'G05',
    circuit: 'hydraulic-oil:boom-lift',
    complaint: 'Ram is wet and it creeps down over dinner.',
    symptoms: ['wet-rod', 'load-drifts'],
    weather: 'dry',
    ambient: '6',
    ambientUnit: 'C',
    hours: 5230,
  });
  await add(jesk, parked, 168, 'method', {
    methodId: 'visual-oil-trace',
    outcome: 'found',
    note: 'ring of oil on the rod, runs from the gland',
  });
  accepted(
    await parkCase(
      { actor: jesk, number: parked },
      {
        reason: 'Seal kit on order, machine can work light',
        until: isoDay(new Date(now.getTime() + 5 * 24 * HOUR_MS)),
      },
    ),
  );

  const running = await open(rhedyn, 260, {
    machine: 'W04',
    circuit: 'refrigerant:cab-front',
    complaint: 'Clicks on and off, half cold. Was all right before they had the pipe off for the hose job.',
    symptoms: ['clutch-short-cycling', 'weak-cooling'],
    weather: 'sunny',
    ambient: '14',
    ambientUnit: 'C',
    hours: 7702,
  });
  await add(rhedyn, running, 258, 'reading', {
    kind: 'low-side-pressure',
    value: '0.6',
    unit: 'bar',
    note: '1,500 rpm',
  });
  await add(rhedyn, running, 258, 'reading', {
    kind: 'high-side-pressure',
    value: '7',
    unit: 'bar',
    note: '1,500 rpm',
  });
  await add(rhedyn, running, 258, 'reading', { kind: 'vent-temperature', value: '17', unit: 'C', note: '' });
  await add(rhedyn, running, 257, 'method', { methodId: 'uv-dye', outcome: 'found', note: '' });
  await add(rhedyn, running, 257, 'finding', {
    componentId: 'compressor-manifold-joint',
    failureModeId: 'oring-cut',
    mechanismId: '',
    causeId: 'fitting-practice',
    certainty: 'confirmed',
    place: 'discharge block, inner ring',
    why: 'Put in dry, cut on the edge of the bore.',
  });
  place(rhedyn, running, 'trace', 257, PAIRS.block);
  await add(rhedyn, running, 250, 'repair', {
    actionId: 'reseal',
    componentId: 'compressor-manifold-joint',
    partNumber: '',
    because: 'failed',
    note: 'Both rings, oiled, bore dressed.',
  });
  accepted(
    await addHoldTest({
      actor: rhedyn,
      number: running,
      input: {
        samples: '0 372\n2 379\n4 384\n6 389\n8 391\n10 394\n15 398\n20 401\n25 402\n30 403\n40 404',
        gauge: 'micron',
        step: 1,
        litres: 3,
        ambient: 14,
        altitude: 310,
        note: 'After 12 bar of dry nitrogen for 30 minutes, no fall, 14 °C at both ends.',
      },
      override: '',
      at: hoursAgo(246),
    }),
  );
  place(rhedyn, running, 'proof', 246, [GAUGES.vacuum]);
  await add(rhedyn, running, 245, 'charge', {
    kind: 'recovered',
    substance: 'R-134a',
    value: '540',
    unit: 'g',
    cylinder: String(cylinders.recovery),
    source: '',
    note: '',
  });
  await add(rhedyn, running, 244, 'charge', {
    kind: 'charged',
    substance: 'R-134a',
    value: '1150',
    unit: 'g',
    cylinder: String(cylinders.full),
    source: '',
    note: 'By weight, plate says the same.',
  });
  place(rhedyn, running, 'charge', 244, [GAUGES.running]);
  accepted(await returnToWork({ actor: rhedyn, number: running }, true, hoursAgo(243)));
  const body = `### What it did\n\nHalf cold and cycling, two days after a hose job.\n\n### What we found\n\nDye out of the discharge block. The inner ring was cut.\n\n### Why it failed\n\nThe ring went in **dry** and caught the edge of the bore.\n\n### What fixed it\n\nBoth rings new and oiled, the edge of the bore taken off.\n\n### How we proved it\n\n12 bar of dry nitrogen for 30 minutes, then vacuum, shut in 40 minutes, no rise.\n\n### What to look for next time\n\n- Any block joint that was apart in the last month.\n- Oil the ring, then push it home by hand before the bolt.\n`;
  accepted(
    await saveWriteUp(
      { actor: rhedyn, number: running },
      { title: 'Oil the ring before the block goes on', body, photos: [], version: undefined },
      hoursAgo(240),
    ),
  );
  accepted(await submitWriteUp({ actor: rhedyn, number: running }, hoursAgo(239)));

  const weep = await open(jesk, 420, {
    machine: 'W14',
    circuit: 'coolant:engine-cooling',
    complaint: 'uses a bottle of water a week, nothing on the floor, sweet smell when its hot',
    symptoms: ['coolant-loss-no-drip', 'low-coolant-warning'],
    weather: 'mild',
    ambient: '51',
    ambientUnit: 'F',
    hours: 3344,
  });
  await add(jesk, weep, 419, 'method', {
    methodId: 'coolant-pressure-kit',
    outcome: 'nothing',
    note: 'cold, held 15 minutes',
  });
  await add(jesk, weep, 400, 'method', {
    methodId: 'uv-dye',
    outcome: 'found',
    note: 'after two days at work',
  });
  place(jesk, weep, 'trace', 400, PAIRS.coolantClamp);
  await saveNotes({ actor: jesk, number: weep }, 'trace', 'Only weeps hot. The clamp turned by hand.');
  accepted(
    await saveWriteUp(
      { actor: jesk, number: weep },
      {
        title: 'Weeps hot, holds cold',
        body: 'Pressure kit on a cold engine said tight. Dye and two days at work said otherwise.',
        photos: [],
        version: undefined,
      },
      hoursAgo(398),
    ),
  );
  accepted(await submitWriteUp({ actor: jesk, number: weep }, hoursAgo(397)));
  accepted(
    await sendBackWriteUp(
      { actor: tamsel, number: weep },
      'Good start. Put the finding on record, do the clamp, and prove it hot.',
      hoursAgo(390),
    ),
  );
  await weighCylinders(crew, cylinders.full, hoursAgo);
  await talkOnImported(crew, hoursAgo, ottolie);
  return photos;
}

function isoDay(time: Date): string {
  return time.toISOString().slice(0, 10);
}
