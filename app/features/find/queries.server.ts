import { Op, QueryTypes } from 'sequelize';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { shopVocabulary } from '#app/features/catalogue/queries.server.ts';
import { sequelize } from '#db/connection.server.ts';
import { Case, Machine } from '#db/models/index.ts';
import { type CaseFilters, filterClause, type RankedCase, rankCases } from './candidates.server.ts';
import { countFacets, type Facet } from './facets.server.ts';
import { type Hit, loadHits } from './hits.server.ts';
import { prepareQuery } from './query.server.ts';
import { type FindInput, PAGE_SIZE } from './schema.ts';

export type Found = {
  hits: Hit[];
  total: number;
  pageCount: number;
  facets: Facet[];
  repaired: { from: string; to: string }[];
  /** A machine whose number was typed. */
  machine: { id: number; number: string; label: string } | null;
};

type Options = FindInput & { limit?: number; onlyNoted?: boolean };

/** The shop's cases for what was typed, or all of them, newest first, when nothing was. */
export async function findCases(
  actor: Actor,
  { q, page, limit = PAGE_SIZE, ...filters }: Options,
): Promise<Found> {
  const vocabulary = await shopVocabulary(actor.shopId);
  const text = q.trim();
  if (text === '') {
    const { ids, total } = await newestCases(actor.shopId, filters, page, limit);
    const hits = await loadHits(ids.map(asHit), [], vocabulary);
    const facets = await countFacets(actor.shopId, filters, null, vocabulary);
    return { hits, total, pageCount: Math.ceil(total / limit), facets, repaired: [], machine: null };
  }
  const [{ terms, repaired }, jump] = [
    await prepareQuery(actor.shopId, text, filters.medium),
    await findByName(actor, text),
  ];
  const ranked = await rankCases(actor.shopId, terms, filters);
  const first = jump.caseIds.map(asHit);
  const named = new Set(jump.caseIds);
  const all = [...first, ...ranked.filter(({ caseId }) => !named.has(caseId))];
  const hits = await loadHits(all.slice((page - 1) * limit, page * limit), terms, vocabulary);
  const facets = await countFacets(
    actor.shopId,
    filters,
    all.map(({ caseId }) => caseId),
    vocabulary,
  );
  return {
    hits,
    total: all.length,
    pageCount: Math.ceil(all.length / limit),
    facets,
    repaired,
    machine: jump.machine,
  };
}

function asHit(caseId: number): Pick<RankedCase, 'caseId' | 'score' | 'contributions'> {
  return { caseId, score: 0, contributions: [] };
}

/** What is named exactly: a case by its number or external id, a machine by its number with its newest cases. */
async function findByName(actor: Actor, text: string) {
  const { shopId } = actor;
  const name = text.slice(0, 190);
  const number = /^#?(\d{1,9})$/.exec(name)?.[1];
  const cases = await Case.findAll({
    where: { shopId, [Op.or]: [{ externalId: name }, ...(number ? [{ number: Number(number) }] : [])] },
    attributes: ['id'],
    limit: 5,
  });
  const machine = await Machine.findOne({ where: { shopId, number: name } });
  const onMachine = machine
    ? await Case.findAll({
        where: { shopId, machineId: machine.id },
        attributes: ['id'],
        order: [['openedAt', 'DESC']],
        limit: 20,
      })
    : [];
  return {
    caseIds: [...new Set([...cases, ...onMachine].map(({ id }) => id))],
    machine: machine && {
      id: machine.id,
      number: machine.number,
      label: `${machine.make} ${machine.model}, ${machine.kind}`,
    },
  };
}

async function newestCases(shopId: number, filters: CaseFilters, page: number, limit: number) {
  const { sql, values } = filterClause(shopId, filters);
  const [count] = await sequelize.query<{ total: number }>(
    `SELECT COUNT(*) AS total FROM search_documents d WHERE ${sql}`,
    {
      replacements: values,
      type: QueryTypes.SELECT,
    },
  );
  const rows = await sequelize.query<{ caseId: number }>(
    `SELECT d.caseId FROM search_documents d WHERE ${sql} ORDER BY d.openedAt DESC, d.id DESC LIMIT :limit OFFSET :offset`,
    { replacements: { ...values, limit, offset: (page - 1) * limit }, type: QueryTypes.SELECT },
  );
  return { ids: rows.map(({ caseId }) => caseId), total: Number(count?.total ?? 0) };
}
