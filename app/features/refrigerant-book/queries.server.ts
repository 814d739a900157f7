import { stringify } from 'csv-stringify/sync';
import { QueryTypes } from 'sequelize';
import { annualizingRate, gramsLostPerYear, rollingAverageRate } from '#app/domain/leak-rate/leak-rate.ts';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { may } from '#app/domain/permissions/matrix.ts';
import {
  CYLINDER_KIND_NAMES,
  type CylinderKind,
  MOVEMENT_KIND_NAMES,
  type MovementKind,
} from '#app/domain/refrigerant-book/book.ts';
import { sequelize } from '#db/connection.server.ts';
import { Cylinder, User } from '#db/models/index.ts';
import type { BookInput } from './schema.ts';

const PAGE_SIZE = 50;
const MOST_EXPORTED = 100_000;

export type MovementView = {
  id: number;
  at: string;
  kind: MovementKind;
  kindName: string;
  refrigerant: string;
  grams: number;
  cylinderLabel: string;
  machineNumber: string;
  caseNumber: number | null;
  certificate: string;
  note: string;
  byName: string;
  reverses: number | null;
  reversed: boolean;
};

type Row = Omit<MovementView, 'at' | 'kindName' | 'reversed'> & { at: Date; reversedBy: number | null };

function conditions(actor: Actor, { from, to, machine, person }: BookInput) {
  const where = ['v.shopId = :shopId'];
  if (from) where.push('v.at >= :from');
  if (to) where.push('v.at < :until');
  if (machine) where.push('m.number = :machine');
  if (person) where.push('v.byId = :person');
  const until = to ? new Date(Date.parse(to) + 24 * 60 * 60_000) : null;
  return {
    sql: where.join(' AND '),
    values: { shopId: actor.shopId, from: from ? new Date(from) : null, until, machine, person },
  };
}

const TABLES = `movements v LEFT JOIN cylinders y ON y.id = v.cylinderId LEFT JOIN machines m ON m.id = v.machineId
  LEFT JOIN cases c ON c.id = v.caseId LEFT JOIN movements r ON r.reversesId = v.id`;

/** The movements of a period, a machine or a person, newest first. */
export async function listMovements(
  actor: Actor,
  input: BookInput,
  limit = PAGE_SIZE,
): Promise<{ movements: MovementView[]; pageCount: number; total: number }> {
  const { sql, values } = conditions(actor, input);
  const [count] = await sequelize.query<{ total: number }>(
    `SELECT COUNT(*) AS total FROM ${TABLES} WHERE ${sql}`,
    {
      replacements: values,
      type: QueryTypes.SELECT,
    },
  );
  const rows = await sequelize.query<Row>(
    `SELECT v.id, v.at, v.kind, v.refrigerant, v.grams, COALESCE(y.label, '') AS cylinderLabel, COALESCE(m.number, '') AS machineNumber,
            c.number AS caseNumber, v.certificate, v.note, v.byName, v.reversesId AS reverses, r.id AS reversedBy
       FROM ${TABLES} WHERE ${sql} ORDER BY v.at DESC, v.id DESC LIMIT :limit OFFSET :offset`,
    { replacements: { ...values, limit, offset: (input.page - 1) * limit }, type: QueryTypes.SELECT },
  );
  const total = Number(count?.total ?? 0);
  return {
    total,
    pageCount: Math.ceil(total / limit),
    movements: rows.map(({ at, reversedBy, ...row }) => ({
      ...row,
      at: at.toISOString(),
      kindName: MOVEMENT_KIND_NAMES[row.kind],
      reversed: reversedBy !== null,
    })),
  };
}

/** Stock, and what went into and came out of each machine: what is missing there is the estimate of its leaks. */
export async function loadStock(actor: Actor) {
  const cylinders = await Cylinder.findAll({ where: { shopId: actor.shopId }, order: [['label', 'ASC']] });
  const rows = await sequelize.query<{ account: string; held: number }>(
    `SELECT account, SUM(grams) AS held FROM (
       SELECT toAccount AS account, grams FROM movements WHERE shopId = :shopId
       UNION ALL SELECT fromAccount, -grams FROM movements WHERE shopId = :shopId) both_sides GROUP BY account`,
    { replacements: { shopId: actor.shopId }, type: QueryTypes.SELECT },
  );
  const held = new Map(rows.map(({ account, held: grams }) => [account, Number(grams)]));
  return {
    cylinders: cylinders.map(({ id, label, refrigerant, kind }) => ({
      id,
      label,
      refrigerant,
      kindName: CYLINDER_KIND_NAMES[kind as CylinderKind],
      grams: held.get(`cylinder:${id}`) ?? 0,
    })),
    /** Nothing when the book balances; otherwise by how much it does not. */
    outOfBalanceGrams: [...held.values()].reduce((sum, grams) => sum + grams, 0),
    overdrawn: cylinders.filter(({ id }) => (held.get(`cylinder:${id}`) ?? 0) < 0).map(({ label }) => label),
  };
}

export async function loadMachineBalances(actor: Actor, input: BookInput) {
  const { sql, values } = conditions(actor, input);
  const rows = await sequelize.query<{ number: string; charged: number; recovered: number }>(
    `SELECT m.number,
            SUM(IF(v.kind = 'charged', IF(v.reversesId IS NULL, v.grams, -v.grams), 0)) AS charged,
            SUM(IF(v.kind = 'recovered', IF(v.reversesId IS NULL, v.grams, -v.grams), 0)) AS recovered
       FROM movements v JOIN machines m ON m.id = v.machineId
      WHERE ${sql} GROUP BY m.id, m.number ORDER BY SUM(v.grams) DESC, m.number LIMIT 200`,
    { replacements: values, type: QueryTypes.SELECT },
  );
  return rows.map(({ number, charged, recovered }) => ({
    number,
    charged: Number(charged),
    recovered: Number(recovered),
  }));
}

export async function loadBookPage(actor: Actor, input: BookInput) {
  const people = await User.findAll({
    where: { shopId: actor.shopId },
    order: [['name', 'ASC']],
  });
  return {
    ...(await loadStock(actor)),
    ...(await listMovements(actor, input)),
    machines: await loadMachineBalances(actor, input),
    people: people.map(({ id, name }) => ({ id, name })),
    may: { write: may(actor.role, 'book:write'), reverse: may(actor.role, 'book:reverse') },
  };
}

/** The book of a period as comma-separated values; cells that a spreadsheet would run as formulas are defused. */
export async function exportBook(actor: Actor, input: BookInput): Promise<string> {
  const { movements } = await listMovements(actor, { ...input, page: 1 }, MOST_EXPORTED);
  return stringify(
    movements.map(({ reversed, kindName: _kindName, ...row }) => ({
      ...row,
      reversed: reversed ? 'yes' : '',
    })),
    {
      header: true,
      escape_formulas: true,
      bom: true,
      columns: [
        'id',
        'at',
        'kind',
        'refrigerant',
        'grams',
        'cylinderLabel',
        'machineNumber',
        'caseNumber',
        'certificate',
        'byName',
        'note',
        'reverses',
        'reversed',
      ],
    },
  );
}

const DAY_MS = 24 * 60 * 60_000;

export type LeakEstimate = {
  /** Per cent a year of the plate by the two methods, from the newest addition and from the year's. */
  annualizing: number | null;
  rolling: number | null;
  gramsPerYear: number | null;
  /** Additions that no repair of the machine came before since the addition before them. */
  toppedUp: { grams: number; at: string }[];
};

/** What a machine's additions say of its leaks; a first fill after a recovery is no addition but a refill. */
export async function loadLeakEstimate(
  actor: Actor,
  machineId: number,
  plateGrams: number | null,
  now: Date,
): Promise<LeakEstimate | null> {
  const rows = await sequelize.query<{ grams: number; at: Date; kind: 'charged' | 'recovered' }>(
    `SELECT v.grams, v.at, v.kind FROM movements v LEFT JOIN movements r ON r.reversesId = v.id
      WHERE v.shopId = :shopId AND v.machineId = :machineId AND v.kind IN ('charged', 'recovered') AND v.reversesId IS NULL AND r.id IS NULL
      ORDER BY v.at, v.id`,
    { replacements: { shopId: actor.shopId, machineId }, type: QueryTypes.SELECT },
  );
  const repairs = await sequelize.query<{ at: Date }>(
    'SELECT a.at FROM repair_actions a JOIN cases c ON c.id = a.caseId WHERE c.machineId = :machineId ORDER BY a.at',
    { replacements: { machineId }, type: QueryTypes.SELECT },
  );
  const additions: { grams: number; at: Date; days: number | null; repaired: boolean }[] = [];
  let recovered = 0;
  let before: Date | null = null;
  for (const { grams, at, kind } of rows) {
    if (kind === 'recovered') {
      recovered += grams;
      continue;
    }
    const since = before;
    const added = Math.max(grams - recovered, 0);
    const repaired = repairs.some((repair) => repair.at <= at && (since === null || repair.at > since));
    if (added > 0)
      additions.push({
        grams: added,
        at,
        days: since ? (at.getTime() - since.getTime()) / DAY_MS : null,
        repaired,
      });
    recovered = 0;
    before = at;
  }
  const newest = additions.at(-1);
  if (!newest) return null;
  const year = additions
    .filter(({ at, days }) => days !== null && now.getTime() - at.getTime() <= 365 * DAY_MS)
    .map(({ grams }) => grams);
  return {
    annualizing: plateGrams && newest.days ? annualizingRate(newest.grams, plateGrams, newest.days) : null,
    rolling: plateGrams ? rollingAverageRate(year, plateGrams) : null,
    gramsPerYear: newest.days ? gramsLostPerYear(newest.grams, newest.days) : null,
    toppedUp: additions
      .filter(({ repaired, days }) => !repaired && days !== null)
      .map(({ grams, at }) => ({ grams, at: at.toISOString() })),
  };
}
