import { beforeEach, describe, expect, test } from 'vitest';
import { changeMachine, createMachine, saveCircuit } from '#app/features/machines/commands.server.ts';
import { importFleet, previewFleet } from '#app/features/machines/fleet-import.server.ts';
import { listMachines, loadMachine } from '#app/features/machines/queries.server.ts';
import { circuitSchema, machineSchema, parseMachineList } from '#app/features/machines/schema.ts';
import { NotFound } from '#app/features/outcome.ts';
import { Machine } from '#db/models/index.ts';
import { type MadeShop, makeShop } from '#tests/setup/people.ts';

let shop: MadeShop;
const now = new Date();
const machine = (fields: Record<string, string>) => machineSchema.parse({ kind: 'loader', ...fields });

beforeEach(async () => {
  shop = await makeShop();
});

async function add(fields: Record<string, string>): Promise<number> {
  const outcome = await createMachine(shop.office, machine(fields), now);
  return outcome.ok ? outcome.value.id : 0;
}

describe('machines', () => {
  test('a number is given once in a shop, and again in another', async () => {
    await add({ number: 'W01' });
    expect(await createMachine(shop.office, machine({ number: 'w01' }), now)).toMatchObject({
      ok: false,
      fields: { number: expect.any(String) },
    });
    const other = await makeShop();
    expect((await createMachine(other.office, machine({ number: 'W01' }), now)).ok).toBe(true);
  });

  test.each([
    [{ number: '' }, 'number'],
    [{ number: 'x', year: '1066' }, 'year'],
    [{ number: 'x', hours: 'many' }, 'hours'],
    [{ number: 'x', hours: '-3' }, 'hours'],
    [{ number: 'x'.repeat(61) }, 'number'],
  ])('%j is refused', (fields, name) => {
    const parsed = machineSchema.safeParse(fields);
    expect(parsed.success ? [] : parsed.error.issues.map(({ path }) => path[0])).toContain(name);
  });

  test('sorted, filtered, in pages; odd addresses fall back', async () => {
    for (const [number, hours, yard] of [
      ['A1', '10', 'North'],
      ['A2', '30', 'South'],
      ['B1', '20', 'North'],
    ] as const)
      await add({ number, hours, yard });
    const list = async (query: string) =>
      (await listMachines(shop.tech, parseMachineList(new URLSearchParams(query)))).machines.map(
        ({ number }) => number,
      );
    expect(await list('sort=-hours')).toEqual(['A2', 'B1', 'A1']);
    expect(await list('q=A2')).toEqual(['A2']);
    expect(await list('q=%25')).toEqual([]);
    expect(await list('sort=nonsense&page=-4&yard=x')).toEqual(['A1', 'A2', 'B1']);
    expect(await list('page=9')).toEqual([]);
  });

  test('two who change one machine: the second is told', async () => {
    const machineId = await add({ number: 'W01' });
    const change = (make: string) =>
      changeMachine(
        { actor: shop.lead, machineId, version: 1, input: machine({ number: 'W01', make }) },
        now,
      );
    expect((await change('Varkholm')).ok).toBe(true);
    expect(await change('Osmerk')).toMatchObject({
      refused: 'conflict',
      byName: shop.lead.name,
      theirs: { make: 'Varkholm' },
      version: 2,
    });
  });

  test('a circuit keeps the plate as it was read, and other media have no refrigerant', async () => {
    const machineId = await add({ number: 'W01' });
    const save = (fields: Record<string, string>) =>
      saveCircuit(
        {
          actor: shop.tech,
          machineId,
          circuitId: null,
          version: undefined,
          input: circuitSchema.parse(fields),
        },
        now,
      );
    await save({
      circuit: 'refrigerant:cab-front',
      refrigerant: 'R-134a',
      plateCharge: '2.5',
      plateChargeUnit: 'lb',
      metering: 'orifice',
    });
    await save({ circuit: 'coolant:engine-cooling', refrigerant: 'R-134a', metering: 'orifice' });
    const { circuits } = await loadMachine(shop.tech, machineId);
    expect(circuits).toMatchObject([
      { refrigerant: 'R-134a', plateCharge: '2.5 lb', metering: 'Fixed orifice' },
      { refrigerant: '', plateCharge: '', metering: '' },
    ]);
    expect(await save({ circuit: 'coolant:cab-front' })).toMatchObject({
      ok: false,
      fields: { circuit: expect.any(String) },
    });
  });

  test('another shop’s machine does not exist', async () => {
    const machineId = await add({ number: 'W01' });
    const other = await makeShop();
    await expect(loadMachine(other.admin, machineId)).rejects.toThrow(NotFound);
    await expect(
      changeMachine({ actor: other.lead, machineId, version: 1, input: machine({ number: 'X' }) }, now),
    ).rejects.toThrow(NotFound);
  });
});

describe('a fleet file', () => {
  const FLEET =
    'Number;Kind;Make;Colour;Hours\nW01;loader;Varkholm;red;100\n"W;02";grader;"Skarvelt ""12""";blue;\n';

  test('is shown first and changes nothing', async () => {
    const preview = await previewFleet(shop.office, FLEET);
    expect(preview).toMatchObject({ fault: null, ignored: ['Colour'] });
    expect(preview.lines.map(({ machine: row }) => row?.number)).toEqual(['W01', 'W;02']);
    expect(await Machine.count({ where: { shopId: shop.shop.id } })).toBe(0);
  });

  test('loads whole, and brings known machines up to date', async () => {
    await add({ number: 'W01', make: 'Old' });
    const result = await importFleet(shop.office, FLEET, now);
    expect(result.loaded).toBe(true);
    const rows = await Machine.findAll({ where: { shopId: shop.shop.id }, order: [['number', 'ASC']] });
    expect(rows).toMatchObject([
      { number: 'W;02', make: 'Skarvelt "12"' },
      { number: 'W01', make: 'Varkholm', hours: 100 },
    ]);
  });

  test('with one wrong line loads nothing, and names line and field', async () => {
    const result = await importFleet(shop.office, 'number,year\nW01,2012\nW02,soon\nW01,2013\n', now);
    expect(result.loaded).toBe(false);
    expect(result.lines.filter(({ errors }) => errors.length > 0)).toMatchObject([
      { line: 3, errors: ['year: Write a whole number.'] },
      { line: 4, errors: ['number: The same number stands on line 2.'] },
    ]);
    expect(await Machine.count({ where: { shopId: shop.shop.id } })).toBe(0);
  });

  test.each([
    ['', 'empty'],
    ['a,b\n1,2\n', 'number'],
    ['number\n', 'no machine'],
    ['number,make\n"W01,x\n', 'quotation mark'],
  ])('%j is refused in words', async (csv, words) => {
    expect((await previewFleet(shop.office, csv)).fault).toContain(words);
  });
});
