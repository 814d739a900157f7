import { Op, QueryTypes, type WhereOptions } from 'sequelize';
import { CASE_STATE_NAMES, type CaseState, type ChainLink } from '#app/domain/chain/chain.ts';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { circuitName, mediumName } from '#app/domain/vocabulary/vocabulary.ts';
import { shopVocabulary } from '#app/features/catalogue/queries.server.ts';
import { sequelize } from '#db/connection.server.ts';
import {
  AuditEntry,
  Case,
  Circuit,
  Comment,
  Machine,
  SameOnMine,
  User,
  WriteUp,
  Yard,
} from '#db/models/index.ts';
import { findCaseRow } from './change-case.server.ts';
import type { CaseListInput } from './list-schema.ts';

const PAGE_SIZE = 25;

export type CaseRowView = {
  number: number;
  title: string;
  state: CaseState;
  chain: ChainLink[];
  medium: string;
  machineNumber: string;
  machineModel: string;
  yardName: string;
  openedAt: string;
  assigneeName: string;
  parkedUntil: string | null;
  parkedReason: string | null;
};

type ListRow = Omit<CaseRowView, 'chain' | 'openedAt' | 'parkedUntil' | 'medium'> & {
  chain: string;
  openedAt: Date;
  parkedUntil: Date | null;
  mediumId: string;
};

const LIST_COLUMNS = `c.number, c.title, c.state, c.chain, c.medium AS mediumId, c.openedAt, c.parkedUntil, c.parkedReason,
  m.number AS machineNumber, m.model AS machineModel, COALESCE(y.name, '') AS yardName,
  COALESCE(a.name, c.technicianName) AS assigneeName`;
const LIST_TABLES = `cases c JOIN machines m ON m.id = c.machineId LEFT JOIN yards y ON y.id = c.yardId
  LEFT JOIN users a ON a.id = c.assigneeId`;
const UNFINISHED = "('open', 'leak-found', 'repaired', 'proved-tight', 'running', 'parked')";
const ORDER: Record<string, string> = {
  number: 'c.number',
  opened: 'c.openedAt',
  machine: 'm.number',
  state: 'c.state',
};

export async function listCases(actor: Actor, input: CaseListInput) {
  const where = ['c.shopId = :shopId'];
  if (input.state === 'unfinished') where.push(`c.state IN ${UNFINISHED}`);
  else if (input.state) where.push('c.state = :state');
  if (input.medium) where.push('c.medium = :medium');
  if (input.yard) where.push('c.yardId = :yard');
  if (input.machine) where.push('c.machineId = :machine');
  if (input.mine) where.push('c.assigneeId = :userId');
  const replacements = { ...input, shopId: actor.shopId, userId: actor.userId };
  const condition = where.join(' AND ');
  const [count] = await sequelize.query<{ total: number }>(
    `SELECT COUNT(*) AS total FROM cases c WHERE ${condition}`,
    {
      replacements,
      type: QueryTypes.SELECT,
    },
  );
  const down = input.sort.startsWith('-') ? 'DESC' : 'ASC';
  const by = ORDER[input.sort.replace('-', '')] ?? 'c.openedAt';
  const rows = await sequelize.query<ListRow>(
    `SELECT ${LIST_COLUMNS} FROM ${LIST_TABLES} WHERE ${condition}
      ORDER BY ${by} ${down}, c.id ${down} LIMIT ${PAGE_SIZE} OFFSET :offset`,
    { replacements: { ...replacements, offset: (input.page - 1) * PAGE_SIZE }, type: QueryTypes.SELECT },
  );
  const vocabulary = await shopVocabulary(actor.shopId);
  const total = Number(count?.total ?? 0);
  return {
    total,
    pageCount: Math.ceil(total / PAGE_SIZE),
    cases: rows.map((row) => toRowView(row, mediumName(vocabulary, row.mediumId))),
  };
}

function toRowView({ mediumId: _mediumId, ...row }: ListRow, medium: string): CaseRowView {
  return {
    ...row,
    medium,
    chain: JSON.parse(row.chain) as ChainLink[],
    openedAt: row.openedAt.toISOString(),
    parkedUntil: row.parkedUntil?.toISOString() ?? null,
  };
}

/**
 * What lies on the bench of a person: their unfinished cases and what each still lacks; for the lead the whole shop's.
 * Records brought in from elsewhere that run again are history, not work.
 */
export async function loadBench(actor: Actor, now: Date) {
  const mine = actor.role === 'tech' ? 'AND c.assigneeId = :userId' : '';
  const rows = await sequelize.query<ListRow>(
    `SELECT ${LIST_COLUMNS} FROM ${LIST_TABLES}
      WHERE c.shopId = :shopId AND c.state IN ${UNFINISHED} AND NOT (c.imported AND c.state = 'running') ${mine}
      ORDER BY c.openedAt DESC, c.id DESC LIMIT 60`,
    { replacements: { shopId: actor.shopId, userId: actor.userId }, type: QueryTypes.SELECT },
  );
  const vocabulary = await shopVocabulary(actor.shopId);
  const cases = rows.map((row) => toRowView(row, mediumName(vocabulary, row.mediumId)));
  const inReview = await WriteUp.findAll({
    where: { shopId: actor.shopId, state: ['in-review', 'sent-back'] },
    order: [['updatedAt', 'DESC']],
    limit: 20,
  });
  const numbers = await caseNumbers(inReview.map(({ caseId }) => caseId));
  return {
    atWork: cases.filter(({ state }) => state !== 'parked'),
    parked: cases.filter(({ state }) => state === 'parked').map((row) => ({ ...row, due: isDue(row, now) })),
    reviews: inReview.map((row) => ({
      caseNumber: numbers.get(row.caseId) ?? 0,
      title: row.title,
      state: row.state,
      authorName: row.authorName,
      mine: row.authorId === actor.userId,
    })),
  };
}

function isDue({ parkedUntil }: CaseRowView, now: Date): boolean {
  return parkedUntil !== null && new Date(parkedUntil) <= now;
}

export async function caseNumbers(caseIds: number[]): Promise<Map<number, number>> {
  const rows = await Case.findAll({ where: { id: caseIds }, attributes: ['id', 'number'] });
  return new Map(rows.map(({ id, number }) => [id, number]));
}

/** The head of a case, which every one of its pages shows. */
export async function loadCaseHead(actor: Actor, number: number) {
  const row = await findCaseRow(actor, number);
  const [machine, circuit, yard, assignee, people, writeUp, vocabulary] = [
    await Machine.findByPk(row.machineId, { rejectOnEmpty: true }),
    await Circuit.findByPk(row.circuitId, { rejectOnEmpty: true }),
    row.yardId === null ? null : await Yard.findByPk(row.yardId),
    row.assigneeId === null ? null : await User.findByPk(row.assigneeId),
    await User.findAll({ where: { shopId: actor.shopId, active: true }, order: [['name', 'ASC']] }),
    await WriteUp.findOne({ where: { caseId: row.id } }),
    await shopVocabulary(actor.shopId),
  ];
  return {
    number: row.number,
    externalId: row.externalId,
    title: row.title,
    state: row.state,
    stateName: CASE_STATE_NAMES[row.state],
    chain: row.chain,
    medium: row.medium,
    mediumName: mediumName(vocabulary, row.medium),
    machine: {
      id: machine.id,
      number: machine.number,
      label: `${machine.make} ${machine.model}`.trim(),
      kind: machine.kind,
    },
    circuit: { id: circuit.id, name: circuitName(vocabulary, circuit) },
    yardName: yard?.name ?? '',
    openedAt: row.openedAt.toISOString(),
    technicianName: row.technicianName,
    assignee: assignee ? { id: assignee.id, name: assignee.name } : null,
    people: people.map(({ id, name }) => ({ id, name })),
    parkedReason: row.parkedReason,
    parkedUntil: row.parkedUntil?.toISOString() ?? null,
    closedReason: row.closedReason,
    backToWorkAt: row.backToWorkAt?.toISOString() ?? null,
    downtimeHours: row.downtimeHours,
    imported: row.imported,
    note: writeUp ? { slug: writeUp.slug, state: writeUp.state, title: writeUp.title } : null,
  };
}
export type CaseHead = Awaited<ReturnType<typeof loadCaseHead>>;

/** Comments and "same on mine" of a case. */
export async function loadTalk(actor: Actor, number: number) {
  const row = await findCaseRow(actor, number);
  const comments = await Comment.findAll({
    where: { caseId: row.id, deletedAt: null },
    order: [
      ['at', 'ASC'],
      ['id', 'ASC'],
    ],
  });
  const same = await SameOnMine.findAll({ where: { caseId: row.id }, order: [['at', 'ASC']] });
  const machines = await Machine.findAll({ where: { id: same.map(({ machineId }) => machineId) } });
  const byId = new Map(machines.map((machine) => [machine.id, machine]));
  return {
    comments: comments.map(({ id, body, byId: authorId, byName, at }) => ({
      id,
      body,
      byName,
      at: at.toISOString(),
      removable: authorId === actor.userId || actor.role === 'lead',
    })),
    sameOnMine: same.map(({ id, machineId, byName, note, at }) => ({
      id,
      machineId,
      machineNumber: byId.get(machineId)?.number ?? '',
      machineLabel: `${byId.get(machineId)?.make ?? ''} ${byId.get(machineId)?.model ?? ''}`.trim(),
      byName,
      note,
      at: at.toISOString(),
    })),
  };
}

const HISTORY_PAGE = 100;

/** Who changed what and when, newest first. */
export async function listHistory(actor: Actor, number: number, page: number) {
  const row = await findCaseRow(actor, number);
  const { rows, count } = await AuditEntry.findAndCountAll({
    where: { caseId: row.id },
    order: [['id', 'DESC']],
    limit: HISTORY_PAGE,
    offset: (page - 1) * HISTORY_PAGE,
  });
  return {
    pageCount: Math.ceil(count / HISTORY_PAGE),
    entries: rows.map(({ id, subject, action, detail, byName, at }) => ({
      id,
      subject,
      action,
      byName,
      at: at.toISOString(),
      details: detailLines(detail),
    })),
  };
}

const HIDDEN_DETAILS = new Set(['link', 'entryId', 'was', 'commentId']);

function detailLines(detail: Record<string, unknown>): { name: string; value: string }[] {
  return Object.entries(detail)
    .filter(
      ([name, value]) => !HIDDEN_DETAILS.has(name) && value !== '' && value !== null && value !== undefined,
    )
    .map(([name, value]) => ({
      name,
      value: (Array.isArray(value) ? value.join(', ') : String(value)).slice(0, 300),
    }))
    .filter(({ value }) => value !== '');
}

/** Machines and yards to choose from when a case is opened or listed. */
export async function listMachineChoices(actor: Actor, where: WhereOptions<Machine> = {}) {
  const machines = await Machine.findAll({
    where: { [Op.and]: [{ shopId: actor.shopId }, where] },
    order: [['number', 'ASC']],
    limit: 2000,
  });
  return machines.map(({ id, number, kind, make, model }) => ({
    id,
    number,
    label: `${make} ${model}, ${kind}`,
  }));
}

export async function listYards(actor: Actor) {
  const yards = await Yard.findAll({ where: { shopId: actor.shopId }, order: [['name', 'ASC']] });
  return yards.map(({ id, name, altitudeM }) => ({ id, name, altitudeM }));
}
