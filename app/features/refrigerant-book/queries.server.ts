import { stringify } from 'csv-stringify/sync';
import { QueryTypes } from 'sequelize';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { may } from '#app/domain/permissions/matrix.ts';
import { refrigerantNamed } from '#app/domain/refrigerant/saturation.ts';
import {
  CYLINDER_KIND_NAMES,
  type CylinderKind,
  cylinderAccount,
  leakedBeyondPlate,
  MOVEMENT_KIND_NAMES,
  type MovementKind,
  PLACE_NAMES,
  PLACES,
  placeOf,
} from '#app/domain/refrigerant-book/book.ts';
import { circuitName } from '#app/domain/vocabulary/vocabulary.ts';
import { shopVocabulary } from '#app/features/catalogue/queries.server.ts';
import { sequelize } from '#db/connection.server.ts';
import { Cylinder, Movement, User } from '#db/models/index.ts';
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
  circuitName: string;
  weighedGrams: number | null;
  caseNumber: number | null;
  certificate: string;
  note: string;
  byName: string;
  reverses: number | null;
  reversed: boolean;
};

type Row = Omit<MovementView, 'at' | 'kindName' | 'reversed' | 'circuitName'> & {
  at: Date;
  reversedBy: number | null;
  label: string | null;
  place: string | null;
};

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
  LEFT JOIN circuits k ON k.id = v.circuitId LEFT JOIN cases c ON c.id = v.caseId LEFT JOIN movements r ON r.reversesId = v.id`;

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
    `SELECT v.id, v.at, v.kind, v.refrigerant, v.grams, v.weighedGrams, k.label, k.place, COALESCE(y.label, '') AS cylinderLabel, COALESCE(m.number, '') AS machineNumber,
            c.number AS caseNumber, v.certificate, v.note, v.byName, v.reversesId AS reverses, r.id AS reversedBy
       FROM ${TABLES} WHERE ${sql} ORDER BY v.at DESC, v.id DESC LIMIT :limit OFFSET :offset`,
    { replacements: { ...values, limit, offset: (input.page - 1) * limit }, type: QueryTypes.SELECT },
  );
  const total = Number(count?.total ?? 0);
  const vocabulary = await shopVocabulary(actor.shopId);
  return {
    total,
    pageCount: Math.ceil(total / limit),
    movements: rows.map(({ at, reversedBy, label, place, ...row }) => ({
      ...row,
      circuitName: label === null || place === null ? '' : circuitName(vocabulary, { label, place }),
      at: at.toISOString(),
      kindName: MOVEMENT_KIND_NAMES[row.kind],
      reversed: reversedBy !== null,
    })),
  };
}

/** Stock, and where everything is that ever came in. */
export async function loadStock(actor: Actor) {
  const { shopId } = actor;
  const cylinders = await Cylinder.findAll({ where: { shopId }, order: [['label', 'ASC']] });
  const rows = await sequelize.query<{ account: string; refrigerant: string; held: number }>(
    `SELECT account, refrigerant, SUM(grams) AS held FROM (
       SELECT toAccount AS account, refrigerant, grams FROM movements WHERE shopId = :shopId
       UNION ALL SELECT fromAccount, refrigerant, -grams FROM movements WHERE shopId = :shopId) both_sides
      GROUP BY account, refrigerant`,
    { replacements: { shopId }, type: QueryTypes.SELECT },
  );
  /** A cylinder holds one refrigerant, so one row; suppliers have one for each. */
  const held = new Map(rows.map(({ account, held: grams }) => [account, Number(grams)]));
  const opened = await Movement.findAll({ where: { shopId, kind: 'opened' }, attributes: ['cylinderId'] });
  const isOpen = new Set(opened.map(({ cylinderId }) => cylinderId));
  return {
    cylinders: cylinders.map(({ id, label, refrigerant, kind }) => ({
      id,
      label,
      refrigerant,
      kindName: CYLINDER_KIND_NAMES[kind as CylinderKind],
      opened: isOpen.has(id),
      grams: held.get(cylinderAccount(id)) ?? 0,
    })),
    whereabouts: whereabouts(rows),
    /** Nothing when the book balances; otherwise by how much it does not. */
    outOfBalanceGrams: rows.reduce((sum, { held: grams }) => sum + Number(grams), 0),
    overdrawn: cylinders
      .filter(({ id }) => (held.get(cylinderAccount(id)) ?? 0) < 0)
      .map(({ label }) => label),
    outsideBook: await chargesOutsideBook(shopId),
  };
}

/** The cylinders that go with a circuit, as choices with what they hold; all of them when its plate names no refrigerant. */
export async function cylinderChoices(
  actor: Actor,
  plate: string,
): Promise<{ value: string; label: string }[]> {
  const wanted = refrigerantNamed(plate);
  const { cylinders } = await loadStock(actor);
  return cylinders
    .filter(({ refrigerant }) => wanted === null || refrigerant === wanted)
    .map(({ id, label, refrigerant, grams }) => ({
      value: String(id),
      label: `${label}, ${refrigerant}, holds ${grams.toLocaleString('en-GB')} g`,
    }));
}

/** For each refrigerant, the grams at each kind of place; suppliers count as what came from them. */
function whereabouts(rows: readonly { account: string; refrigerant: string; held: number }[]) {
  const refrigerants = [...new Set(rows.map(({ refrigerant }) => refrigerant))].sort();
  return refrigerants.map((refrigerant) => ({
    refrigerant,
    places: PLACES.map((place) => {
      const grams = rows
        .filter((row) => row.refrigerant === refrigerant && placeOf(row.account) === place)
        .reduce((sum, row) => sum + Number(row.held), 0);
      return { place, name: PLACE_NAMES[place], grams: place === 'supplier' ? -grams : grams };
    }),
  }));
}

/** Refrigerant that cases say went in or out but that no cylinder of the book stands for, since the book was begun. */
async function chargesOutsideBook(shopId: number): Promise<{ count: number; cases: number[] }> {
  const rows = await sequelize.query<{ number: number; entries: number }>(
    `SELECT c.number, COUNT(*) AS entries FROM charges g JOIN cases c ON c.id = g.caseId
      WHERE g.shopId = :shopId AND c.medium = 'refrigerant' AND g.kind IN ('charged', 'recovered') AND g.amountSi > 0
        AND g.cylinderId IS NULL AND g.at >= (SELECT MIN(at) FROM movements WHERE shopId = :shopId)
      GROUP BY c.number ORDER BY c.number DESC`,
    { replacements: { shopId }, type: QueryTypes.SELECT },
  );
  return {
    count: rows.reduce((sum, { entries }) => sum + Number(entries), 0),
    cases: rows.slice(0, 20).map(({ number }) => number),
  };
}

/** What went into and came out of each circuit over the period; what stays beyond its plate has leaked. */
export async function loadCircuitBalances(actor: Actor, input: BookInput) {
  const { sql, values } = conditions(actor, input);
  const rows = await sequelize.query<{
    number: string;
    label: string;
    place: string;
    plate: number | null;
    charged: number;
    recovered: number;
  }>(
    `SELECT m.number, k.label, k.place, k.plateChargeGrams AS plate,
            SUM(IF(v.kind = 'charged', IF(v.reversesId IS NULL, v.grams, -v.grams), 0)) AS charged,
            SUM(IF(v.kind = 'recovered', IF(v.reversesId IS NULL, v.grams, -v.grams), 0)) AS recovered
       FROM movements v JOIN circuits k ON k.id = v.circuitId JOIN machines m ON m.id = k.machineId
      WHERE ${sql} GROUP BY k.id, m.number, k.label, k.place, k.plateChargeGrams ORDER BY SUM(v.grams) DESC, m.number LIMIT 200`,
    { replacements: values, type: QueryTypes.SELECT },
  );
  const vocabulary = await shopVocabulary(actor.shopId);
  return rows.map(({ number, label, place, plate, charged, recovered }) => ({
    number,
    circuit: circuitName(vocabulary, { label, place }),
    charged: Number(charged),
    recovered: Number(recovered),
    plateGrams: plate === null ? null : Number(plate),
    leakedGrams: leakedBeyondPlate(Number(charged), Number(recovered), plate === null ? null : Number(plate)),
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
    circuits: await loadCircuitBalances(actor, input),
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
        'weighedGrams',
        'cylinderLabel',
        'machineNumber',
        'circuitName',
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
