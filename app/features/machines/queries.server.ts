import { QueryTypes } from 'sequelize';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { unitLabel } from '#app/domain/units/units.ts';
import { circuitName, mediumName, nameOf } from '#app/domain/vocabulary/vocabulary.ts';
import { shopVocabulary } from '#app/features/catalogue/queries.server.ts';
import { NotFound } from '#app/features/outcome.ts';
import { sequelize } from '#db/connection.server.ts';
import { Case, Circuit, Machine, Yard } from '#db/models/index.ts';
import type { MachineListInput } from './schema.ts';

const PAGE_SIZE = 25;
const ORDER: Record<string, string> = {
  number: 'm.number',
  kind: 'm.kind',
  model: 'm.model',
  yard: 'yardName',
  hours: 'm.hours',
  cases: 'caseCount',
};

export type MachineRowView = {
  id: number;
  number: string;
  kind: string;
  make: string;
  model: string;
  yardName: string;
  hours: number | null;
  caseCount: number;
};

export async function listMachines(actor: Actor, { q, kind, yard, sort, page }: MachineListInput) {
  const where = ['m.shopId = :shopId'];
  if (kind) where.push('m.kind = :kind');
  if (yard) where.push('m.yardId = :yard');
  if (q.trim())
    where.push(
      '(m.number LIKE :like OR m.make LIKE :like OR m.model LIKE :like OR m.kind LIKE :like OR m.serial LIKE :like)',
    );
  const like = `%${q.trim().replace(/[\\%_]/g, '\\$&')}%`;
  const replacements = { shopId: actor.shopId, kind, yard, like };
  const [count] = await sequelize.query<{ total: number }>(
    `SELECT COUNT(*) AS total FROM machines m WHERE ${where.join(' AND ')}`,
    { replacements, type: QueryTypes.SELECT },
  );
  const down = sort.startsWith('-') ? 'DESC' : 'ASC';
  const machines = await sequelize.query<MachineRowView>(
    `SELECT m.id, m.number, m.kind, m.make, m.model, COALESCE(y.name, '') AS yardName, m.hours,
            (SELECT COUNT(*) FROM cases c WHERE c.machineId = m.id) AS caseCount
       FROM machines m LEFT JOIN yards y ON y.id = m.yardId
      WHERE ${where.join(' AND ')}
      ORDER BY ${ORDER[sort.replace('-', '')] ?? 'm.number'} ${down}, m.id ASC LIMIT ${PAGE_SIZE} OFFSET :offset`,
    { replacements: { ...replacements, offset: (page - 1) * PAGE_SIZE }, type: QueryTypes.SELECT },
  );
  const total = Number(count?.total ?? 0);
  return {
    total,
    pageCount: Math.ceil(total / PAGE_SIZE),
    machines: machines.map((row) => ({ ...row, caseCount: Number(row.caseCount) })),
  };
}

/** The kinds of machine that the shop has, for filters and suggestions. */
export async function listMachineKinds(actor: Actor): Promise<string[]> {
  const rows = await sequelize.query<{ kind: string }>(
    "SELECT DISTINCT kind FROM machines WHERE shopId = :shopId AND kind <> '' ORDER BY kind LIMIT 200",
    { replacements: { shopId: actor.shopId }, type: QueryTypes.SELECT },
  );
  return rows.map(({ kind }) => kind);
}

export async function findMachine(actor: Actor, machineId: number): Promise<Machine> {
  const machine = await Machine.findOne({ where: { id: machineId, shopId: actor.shopId } });
  if (!machine) throw new NotFound();
  return machine;
}

export async function loadMachine(actor: Actor, machineId: number) {
  const machine = await findMachine(actor, machineId);
  const yard = machine.yardId === null ? null : await Yard.findByPk(machine.yardId);
  const circuits = await Circuit.findAll({ where: { machineId }, order: [['id', 'ASC']] });
  const cases = await Case.findAll({
    where: { machineId, shopId: actor.shopId },
    order: [['openedAt', 'DESC']],
    limit: 200,
  });
  const vocabulary = await shopVocabulary(actor.shopId);
  return {
    id: machine.id,
    number: machine.number,
    kind: machine.kind,
    make: machine.make,
    model: machine.model,
    serial: machine.serial,
    year: machine.year,
    hours: machine.hours,
    notes: machine.notes,
    yardName: yard?.name ?? '',
    version: machine.version,
    circuits: circuits.map((circuit) => ({
      id: circuit.id,
      name: circuitName(vocabulary, circuit),
      place: nameOf(vocabulary, 'circuit', circuit.place),
      mediumName: mediumName(vocabulary, circuit.medium),
      refrigerant: circuit.refrigerant,
      plateGrams: circuit.plateChargeGrams,
      plateCharge: circuit.plateCharge ? `${circuit.plateCharge} ${unitLabel(circuit.plateChargeUnit)}` : '',
      oil: circuit.oil,
      metering: METERING_NAMES[circuit.metering],
      portsText: circuit.portsText,
    })),
    cases: cases.map(({ number, title, state, openedAt, circuitId }) => ({
      number,
      title,
      state,
      openedAt: openedAt.toISOString(),
      circuitId,
    })),
  };
}

export const METERING_NAMES = {
  '': '',
  'expansion-valve': 'Expansion valve',
  orifice: 'Fixed orifice',
} as const;

export async function loadCircuit(actor: Actor, machineId: number, circuitId: number) {
  const machine = await findMachine(actor, machineId);
  const circuit = await Circuit.findOne({ where: { id: circuitId, machineId } });
  if (!circuit) throw new NotFound();
  return {
    machine: { id: machine.id, number: machine.number, label: `${machine.make} ${machine.model}`.trim() },
    id: circuit.id,
    circuit: `${circuit.medium}:${circuit.place}`,
    medium: circuit.medium,
    label: circuit.label,
    refrigerant: circuit.refrigerant,
    plateCharge: circuit.plateCharge,
    plateChargeUnit: circuit.plateChargeUnit,
    oil: circuit.oil,
    metering: circuit.metering,
    portsText: circuit.portsText,
    version: circuit.version,
  };
}

/** The circuits of a machine as choices. */
export async function listCircuitChoices(actor: Actor, machineId: number) {
  const circuits = await Circuit.findAll({
    where: { machineId, shopId: actor.shopId },
    order: [['id', 'ASC']],
  });
  const vocabulary = await shopVocabulary(actor.shopId);
  return circuits.map(({ id, label, place, medium }) => ({
    value: String(id),
    label: `${circuitName(vocabulary, { label, place })}, ${mediumName(vocabulary, medium).toLowerCase()}`,
  }));
}

/** Every machine's circuits under its number in lower case, for the form that opens a case. */
export async function listCircuitsByMachine(actor: Actor) {
  const rows = await sequelize.query<{
    number: string;
    id: number;
    label: string;
    place: string;
    medium: string;
  }>(
    `SELECT m.number, c.id, c.label, c.place, c.medium FROM circuits c JOIN machines m ON m.id = c.machineId
      WHERE c.shopId = :shopId ORDER BY c.id LIMIT 5000`,
    { replacements: { shopId: actor.shopId }, type: QueryTypes.SELECT },
  );
  const vocabulary = await shopVocabulary(actor.shopId);
  const byMachine: Record<string, { value: string; label: string; medium: string }[]> = {};
  for (const { number, id, label, place, medium } of rows) {
    const circuits = byMachine[number.toLowerCase()] ?? [];
    const name = circuitName(vocabulary, { label, place });
    circuits.push({
      value: String(id),
      label: `${name}, ${mediumName(vocabulary, medium).toLowerCase()}`,
      medium,
    });
    byMachine[number.toLowerCase()] = circuits;
  }
  return byMachine;
}
