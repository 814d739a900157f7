import { beforeEach, describe, expect, test } from 'vitest';
import { addEntry, changeEntry } from '#app/features/cases/entries.server.ts';
import { addHoldTest, type HoldTestInput, listHoldTests } from '#app/features/cases/hold-tests.server.ts';
import { loadLinks } from '#app/features/cases/link-views.server.ts';
import {
  addPressureTest,
  gaugeTestSchema,
  ramTestSchema,
} from '#app/features/cases/pressure-tests.server.ts';
import { loadCaseHead } from '#app/features/cases/queries.server.ts';
import { readingsSpeak } from '#app/features/cases/readings-speak.server.ts';
import { Forbidden } from '#app/features/outcome.ts';
import { Case, Circuit, GateOverride, Yard } from '#db/models/index.ts';
import { openTestCase } from '#tests/setup/forms.ts';
import { type MadeShop, makeMachine, makeShop } from '#tests/setup/people.ts';

let shop: MadeShop;
let number: number;

beforeEach(async () => {
  shop = await makeShop();
  const { machine, circuit } = await makeMachine(shop.shop.id);
  await circuit.update({
    refrigerant: 'R-134a',
    plateCharge: '1150',
    plateChargeUnit: 'g',
    plateChargeGrams: 1150,
  });
  const yard = await Yard.create({ shopId: shop.shop.id, name: 'Hill', altitudeM: 1500 });
  await machine.update({ yardId: yard.id });
  number = await openTestCase(shop.tech);
});

const charge = (kind: 'charged' | 'recovered', value: string, override = '', actor = shop.tech) =>
  addEntry({
    actor,
    number,
    kind: 'charge',
    input: { kind, value, unit: 'g', substance: 'R-134a', source: '', note: '' },
    override,
  });
const reading = (kind: string, value: string, unit: string) =>
  addEntry({ actor: shop.tech, number, kind: 'reading', input: { kind, value, unit, note: '' } });
const prove = (verdict: 'tight' | 'not-tight') =>
  addEntry({
    actor: shop.tech,
    number,
    kind: 'proof',
    input: { method: 'Hold', verdict, minutes: '30', start: '', end: '', unit: '', note: '' },
  });

const FLAT: HoldTestInput = {
  samples: Array.from({ length: 16 }, (_, minute) => `${minute} ${300 + (minute % 2)}`).join('\n'),
  gauge: 'micron',
  step: 1,
  litres: 3,
  ambient: 20,
  altitude: 0,
  note: '',
};
const hold = (input: Partial<HoldTestInput> = {}, override = '', actor = shop.tech) =>
  addHoldTest({ actor, number, input: { ...FLAT, ...input }, override });

describe('charging', () => {
  test('is refused before the circuit is proved tight, and says why', async () => {
    expect(await charge('charged', '800')).toMatchObject({
      ok: false,
      refused: 'gate',
      gate: 'charge-unproved',
      lacks: ['there is no proof'],
    });
    await prove('not-tight');
    expect(await charge('charged', '800')).toMatchObject({ lacks: ['the newest proof does not say tight'] });
    await prove('tight');
    expect((await charge('charged', '800')).ok).toBe(true);
  });

  test('taking out is never refused', async () => {
    expect((await charge('recovered', '300')).ok).toBe(true);
  });

  test('past the plate is refused, what went in before counted, until it is taken out', async () => {
    await prove('tight');
    expect((await charge('charged', '800')).ok).toBe(true);
    expect(await charge('charged', '500')).toMatchObject({ refused: 'gate', gate: 'charge-past-plate' });
    expect((await charge('recovered', '800')).ok).toBe(true);
    expect((await charge('charged', '1150')).ok).toBe(true);
  });

  test('cannot be smuggled in by changing an entry', async () => {
    const added = await charge('recovered', '300');
    const entryId = added.ok ? added.value.id : 0;
    const input = { kind: 'charged' as const, value: '300', unit: 'g', substance: '', source: '', note: '' };
    expect(
      await changeEntry({ actor: shop.tech, number, kind: 'charge', entryId, version: undefined, input }),
    ).toMatchObject({ refused: 'gate' });
  });

  test('a lead overrides with a reason that stays visible; a tech cannot', async () => {
    await expect(charge('charged', '800', 'in a hurry')).rejects.toThrow(Forbidden);
    expect((await charge('charged', '800', 'Harvest, customer told, back on Friday.', shop.lead)).ok).toBe(
      true,
    );
    expect(await GateOverride.findAll()).toMatchObject([
      { gate: 'charge-unproved', reason: 'Harvest, customer told, back on Friday.', byName: shop.lead.name },
    ]);
    const { view } = await loadLinks(shop.tech, number);
    expect(view.overrides).toHaveLength(1);
  });
});

describe('a vacuum hold', () => {
  test('is refused while the standing pressure says refrigerant is inside and none was taken out', async () => {
    await reading('standing-pressure', '70', 'psi');
    await reading('ambient-temperature', '21', 'C');
    expect(await hold()).toMatchObject({ refused: 'gate', gate: 'evacuate-unrecovered' });
    await expect(hold({}, 'just do it')).rejects.toThrow(Forbidden);
    await charge('recovered', '600');
    expect((await hold()).ok).toBe(true);
  });

  test('of an empty circuit goes on, and its verdict becomes the proof', async () => {
    await reading('standing-pressure', '0', 'psi');
    await reading('ambient-temperature', '21', 'C');
    expect((await hold()).ok).toBe(true);
    expect((await loadCaseHead(shop.tech, number)).state).toBe('proved-tight');
    const row = await Case.findOne({ where: { shopId: shop.shop.id, number }, rejectOnEmpty: true });
    expect(await listHoldTests(row)).toMatchObject([
      { analysis: { verdict: 'tight' }, gauge: 'micron', refrigerant: 'R-134a' },
    ]);
  });

  test('that rises is no proof', async () => {
    await hold({
      samples: Array.from({ length: 16 }, (_, minute) => `${minute} ${300 + 40 * minute}`).join('\n'),
    });
    expect((await loadLinks(shop.tech, number)).view.proofs).toMatchObject([
      { values: { verdict: 'not-tight' } },
    ]);
    expect(await charge('charged', '800')).toMatchObject({ gate: 'charge-unproved' });
  });

  test('cannot be given another verdict by hand', async () => {
    await hold({
      samples: Array.from({ length: 16 }, (_, minute) => `${minute} ${300 + 40 * minute}`).join('\n'),
    });
    const [proof] = (await loadLinks(shop.tech, number)).view.proofs;
    const input = {
      method: 'Hold',
      verdict: 'tight' as const,
      minutes: '15',
      start: '',
      end: '',
      unit: '',
      note: '',
    };
    const changed = await changeEntry({
      actor: shop.tech,
      number,
      kind: 'proof',
      entryId: proof?.id ?? 0,
      version: undefined,
      input,
    });
    expect(changed).toMatchObject({ ok: false, fields: { verdict: expect.any(String) } });
  });

  test.each([
    ['0 300\n1 x', 'Line 2'],
    ['0 300\n1 301', 'at least 5'],
    ['-1 300\n1 2\n2 3\n3 4\n4 5', 'Line 1'],
    ['0 99999999', 'cannot read that'],
  ])('with readings like %j is refused in words', async (samples, words) => {
    const outcome = await hold({ samples });
    expect(outcome.ok === false && outcome.refused === 'fields' && outcome.fields.samples).toContain(words);
  });
});

describe('a pressure test with dry nitrogen', () => {
  /** The handbook's curve P10: 150 psi at 38 °C end at about 144 psi at 27 °C without a leak. */
  test.each([
    ['144', '27', 'tight'],
    ['144', '38', 'not-tight'],
    ['130', '27', 'not-tight'],
    ['160', '27', 'cannot-tell'],
  ])('that ends at %s psi and %s °C: %s', async (endPressure, endC, verdict) => {
    const input = gaugeTestSchema.parse({
      startPressure: '150',
      endPressure,
      pressureUnit: 'psi',
      pressureStep: '1',
      startTemperature: '38',
      endTemperature: endC,
      pressureMinutes: '30',
    });
    expect((await addPressureTest({ actor: shop.tech, number, input })).ok).toBe(true);
    expect((await loadLinks(shop.tech, number)).view.proofs).toMatchObject([{ values: { verdict } }]);
  });
});

describe('pressure tests of other media', () => {
  const onMedium = async (medium: string) => {
    await Circuit.update({ medium }, { where: { shopId: shop.shop.id } });
    await Case.update({ medium }, { where: { shopId: shop.shop.id } });
  };
  const gauge = (fields: Record<string, string>) =>
    gaugeTestSchema.parse({
      startPressure: '1,03',
      endPressure: '1.03',
      pressureUnit: 'bar',
      pressureStep: '0.01',
      startTemperature: '68',
      startTemperatureUnit: 'F',
      endTemperature: '20',
      pressureMinutes: '15',
      ...fields,
    });
  const ram = ramTestSchema.parse({
    bore: '100',
    rod: '0',
    column: '800',
    drift: '12',
    driftStep: '1',
    lengthUnit: 'mm',
    startTemperature: '50',
    endTemperature: '40',
    pressureMinutes: '10',
  });
  const record = (input: Parameters<typeof addPressureTest>[0]['input']) =>
    addPressureTest({ actor: shop.tech, number, input });
  const proof = async () => (await loadLinks(shop.tech, number)).view.proofs.at(-1);

  test('coolant: what was typed stays, 68 °F and 20 °C are one temperature', async () => {
    await onMedium('coolant');
    expect((await record(gauge({}))).ok).toBe(true);
    expect(await proof()).toMatchObject({
      values: { verdict: 'tight', start: '1,03', end: '1.03', unit: 'bar' },
    });
    await record(gauge({ endTemperature: '60', endPressure: '1.3' }));
    expect(await proof()).toMatchObject({
      values: { verdict: 'cannot-tell' },
      note: expect.stringContaining('did not keep its temperature'),
    });
  });

  test('air: the loss as free air', async () => {
    await onMedium('compressed-air');
    await record(gauge({ startPressure: '8', endPressure: '7', litres: '40', pressureMinutes: '5' }));
    /** 40 l losing 1 bar in 5 minutes: 8 l·bar a minute, 7.9 l of free air. */
    expect(await proof()).toMatchObject({
      values: { verdict: 'not-tight' },
      note: expect.stringContaining('about 7.9 litres of free air'),
    });
  });

  test('a ram: what the cooling oil explains is taken out', async () => {
    await onMedium('hydraulic-oil');
    expect((await record(ram)).ok).toBe(true);
    /** 12 mm less 5.6 mm over 10 minutes on 78.54 cm²: 5.0 ml a minute. */
    expect(await proof()).toMatchObject({
      values: { verdict: 'not-tight' },
      note: expect.stringContaining('5 ml a minute past a valve'),
    });
  });

  test('a medium is not proved in another’s way', async () => {
    expect(await record(ram)).toMatchObject({ ok: false, fields: { '': expect.any(String) } });
    await onMedium('gear-oil');
    expect((await record(gauge({}))).ok).toBe(false);
  });

  test.each([
    [{ rod: '100' }, 'rod'],
    [{ bore: 'x' }, 'bore'],
    [{ drift: '-1' }, 'drift'],
    [{ lengthUnit: 'psi' }, 'lengthUnit'],
  ])('a ram with %j is refused', (fields, name) => {
    const parsed = ramTestSchema.safeParse({ ...ram, ...textOf(ram), ...fields });
    expect(parsed.success ? [] : parsed.error.issues.map(({ path }) => path[0])).toContain(name);
  });
});

function textOf(fields: Record<string, unknown>): Record<string, string> {
  return Object.fromEntries(Object.entries(fields).map(([name, value]) => [name, String(value)]));
}

describe('readings speak', () => {
  test('at the altitude of the yard', async () => {
    await reading('standing-pressure', '73.5', 'psi');
    await reading('ambient-temperature', '70', 'F');
    await reading('low-side-pressure', '5', 'psi');
    await reading('high-side-pressure', '300', 'psi');
    await reading('suction-line-temperature', '2', 'C');
    await reading('vent-temperature', '9', 'C');
    const { row, evidence } = await loadLinks(shop.tech, number);
    const spoken = await readingsSpeak(row, evidence);
    expect(spoken).toMatchObject({ refrigerant: 'R-134a', altitudeM: 1500, standing: { verdict: 'liquid' } });
    expect(spoken.running?.reading).toMatchObject({ low: 'low', high: 'high' });
    expect(spoken.superheatK).toBeGreaterThan(10);
    expect(spoken.ventBelowAmbientK).toBeCloseTo(12.1, 1);
  });

  test('an unknown refrigerant says nothing', async () => {
    await Circuit.update({ refrigerant: 'mystery gas' }, { where: { shopId: shop.shop.id } });
    await reading('standing-pressure', '70', 'psi');
    const { row, evidence } = await loadLinks(shop.tech, number);
    expect(await readingsSpeak(row, evidence)).toMatchObject({
      refrigerant: null,
      standing: null,
      running: null,
    });
  });
});
