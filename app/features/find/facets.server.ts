import { QueryTypes } from 'sequelize';
import { CASE_STATE_NAMES, type CaseState } from '#app/domain/chain/chain.ts';
import { mediumName, nameOf, type Vocabulary } from '#app/domain/vocabulary/vocabulary.ts';
import { sequelize } from '#db/connection.server.ts';
import { type CaseFilters, filterClause } from './candidates.server.ts';
import { FACETS, type FacetName } from './schema.ts';

export type Facet = { name: FacetName; options: { value: string; label: string; count: number }[] };

type Row = {
  medium: string;
  state: CaseState;
  componentIds: string;
  failureModeIds: string;
  methodIds: string;
  machineId: number | null;
  machineNumber: string | null;
  yardId: number | null;
  yardName: string | null;
  openedAt: Date;
};

const MOST_OPTIONS = 12;

/** Counts over the given cases, or over all that pass the filters when none are given. */
export async function countFacets(
  shopId: number,
  filters: CaseFilters,
  caseIds: readonly number[] | null,
  vocabulary: Vocabulary,
): Promise<Facet[]> {
  if (caseIds?.length === 0) return [];
  const { sql, values } = filterClause(shopId, filters);
  const rows = await sequelize.query<Row>(
    `SELECT d.medium, d.state, d.componentIds, d.failureModeIds, d.methodIds, d.machineId, m.number AS machineNumber,
            d.yardId, y.name AS yardName, d.openedAt
       FROM search_documents d
       LEFT JOIN machines m ON m.id = d.machineId
       LEFT JOIN yards y ON y.id = d.yardId
      WHERE ${sql} ${caseIds ? 'AND d.caseId IN (:caseIds)' : ''}
      ORDER BY d.openedAt DESC LIMIT 5000`,
    { replacements: { ...values, caseIds }, type: QueryTypes.SELECT },
  );
  return FACETS.map((name) => ({ name, options: countOptions(rows, name, vocabulary) })).filter(
    ({ options }) => options.length > 0,
  );
}

function countOptions(rows: readonly Row[], name: FacetName, vocabulary: Vocabulary): Facet['options'] {
  const counts = new Map<string, { label: string; count: number }>();
  for (const row of rows) {
    for (const [value, label] of optionsOf(row, name, vocabulary)) {
      const option = counts.get(value) ?? { label, count: 0 };
      option.count += 1;
      counts.set(value, option);
    }
  }
  return [...counts]
    .map(([value, option]) => ({ value, ...option }))
    .sort((x, y) => y.count - x.count || x.label.localeCompare(y.label))
    .slice(0, MOST_OPTIONS);
}

function optionsOf(row: Row, name: FacetName, vocabulary: Vocabulary): [string, string][] {
  const ids = (json: string) => JSON.parse(json) as string[];
  switch (name) {
    case 'medium':
      return [[row.medium, mediumName(vocabulary, row.medium)]];
    case 'state':
      return [[row.state, CASE_STATE_NAMES[row.state]]];
    case 'component':
      return ids(row.componentIds).map((id) => [id, nameOf(vocabulary, 'component', id)]);
    case 'failure':
      return ids(row.failureModeIds).map((id) => [id, nameOf(vocabulary, 'failure-mode', id)]);
    case 'method':
      return ids(row.methodIds).map((id) => [id, nameOf(vocabulary, 'method', id)]);
    case 'machine':
      return row.machineId ? [[String(row.machineId), row.machineNumber ?? '']] : [];
    case 'yard':
      return row.yardId ? [[String(row.yardId), row.yardName ?? '']] : [];
    case 'year': {
      const year = String(row.openedAt.getUTCFullYear());
      return [[year, year]];
    }
  }
}
