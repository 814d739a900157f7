import { Op, QueryTypes } from 'sequelize';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { may } from '#app/domain/permissions/matrix.ts';
import { type Compared, likenessReasons, queryFromDocument } from '#app/domain/search/alike.ts';
import { analyseQuery, type Term } from '#app/domain/search/analyser.ts';
import { inverseFrequency } from '#app/domain/search/rank.ts';
import { entry, type Vocabulary } from '#app/domain/vocabulary/vocabulary.ts';
import { recordAudit } from '#app/features/audit/audit.server.ts';
import { findCaseRow } from '#app/features/cases/change-case.server.ts';
import { shopVocabulary } from '#app/features/catalogue/queries.server.ts';
import { Forbidden, NotFound } from '#app/features/outcome.ts';
import { sequelize } from '#db/connection.server.ts';
import { Case, Likeness, Machine, SearchDocument } from '#db/models/index.ts';
import { transact } from '#db/transact.server.ts';
import { documentFrequencies, type RankedCase, rankCases } from './candidates.server.ts';
import { type Hit, loadHits } from './hits.server.ts';

export type AlikeHit = Hit & { reasons: string[]; verdict: 'confirmed' | 'dismissed' | null };

const CONFIRMED_BOOST = 1.5;
const SYMPTOM_WEIGHT = 0.8;

/** The cases most like one, confirmed ones boosted, dismissed ones last and marked. */
export async function alikeCases(actor: Actor, number: number, limit: number): Promise<AlikeHit[]> {
  const row = await findCaseRow(actor, number);
  const document = await SearchDocument.findOne({ where: { kind: 'case', caseId: row.id } });
  if (!document) return [];
  const terms = new Map(document.vector);
  const frequencies = await documentFrequencies(actor.shopId, [...terms.keys()]);
  const total = await SearchDocument.count({ where: { shopId: actor.shopId } });
  const query = queryFromDocument(terms, (term) => inverseFrequency(total, frequencies.get(term) ?? 0));
  const ranked = await rankCases(actor.shopId, query, { medium: row.medium }, row.id);
  const judged = await loadVerdicts(row.id);
  const confirmed = [...judged].filter(([, verdict]) => verdict === 'confirmed').map(([caseId]) => caseId);
  const present = new Set(ranked.map(({ caseId }) => caseId));
  const missing: RankedCase[] = confirmed
    .filter((caseId) => !present.has(caseId))
    .map((caseId) => ({ id: 0, caseId, score: 0, contributions: [] }));
  const ordered = [...ranked, ...missing]
    .map((hit) => ({
      ...hit,
      score: judged.get(hit.caseId) === 'confirmed' ? hit.score * CONFIRMED_BOOST : hit.score,
    }))
    .sort((x, y) => standing(judged.get(x.caseId)) - standing(judged.get(y.caseId)) || y.score - x.score);
  const vocabulary = await shopVocabulary(actor.shopId);
  const [self] = await loadCompared([row.id]);
  return explain(ordered.slice(0, limit), query, self ?? null, judged, vocabulary);
}

/** Confirmed likenesses stand before unjudged ones, dismissed ones after them. */
function standing(verdict: 'confirmed' | 'dismissed' | undefined): number {
  if (verdict === 'confirmed') return 0;
  return verdict === 'dismissed' ? 2 : 1;
}

type Draft = { text: string; symptomIds: string[]; medium?: string; machineNumber?: string };

/** Solved cases like a complaint that is being typed. */
export async function alikeComplaint(actor: Actor, draft: Draft, limit: number): Promise<AlikeHit[]> {
  const vocabulary = await shopVocabulary(actor.shopId);
  const machine = draft.machineNumber
    ? await Machine.findOne({ where: { shopId: actor.shopId, number: draft.machineNumber } })
    : null;
  const named = draft.symptomIds.flatMap((id) => {
    const symptom = entry(vocabulary, 'symptom', id);
    return symptom ? [symptom.name, ...symptom.otherNames] : [];
  });
  const query = strongest([
    ...analyseQuery(draft.text, draft.medium),
    ...analyseQuery(named.join('. '), draft.medium).map(({ term, weight }) => ({
      term,
      weight: weight * SYMPTOM_WEIGHT,
    })),
    ...(machine ? analyseQuery(machine.model).map(({ term, weight }) => ({ term, weight: weight / 2 })) : []),
  ]);
  const ranked = await rankCases(actor.shopId, query, { medium: draft.medium, onlySolved: true });
  const self: Compared = {
    medium: draft.medium ?? '',
    machineId: machine?.id ?? null,
    machineModel: machine?.model ?? '',
    symptomIds: draft.symptomIds,
    componentIds: [],
    failureModeIds: [],
  };
  return explain(ranked.slice(0, limit), query, { caseId: 0, ...self }, new Map(), vocabulary);
}

function strongest(terms: readonly Term[]): Term[] {
  const best = new Map<string, number>();
  for (const { term, weight } of terms) best.set(term, Math.max(weight, best.get(term) ?? 0));
  return [...best].map(([term, weight]) => ({ term, weight }));
}

async function explain(
  hits: readonly RankedCase[],
  query: readonly Term[],
  self: (Compared & { caseId: number }) | null,
  judged: ReadonlyMap<number, 'confirmed' | 'dismissed'>,
  vocabulary: Vocabulary,
): Promise<AlikeHit[]> {
  const shown = await loadHits(hits, query, vocabulary);
  const compared = new Map(
    (await loadCompared(hits.map(({ caseId }) => caseId))).map((one) => [one.number, one]),
  );
  return shown.map((hit) => {
    const other = compared.get(hit.number);
    const words = [
      ...new Set(hit.passage.filter(({ marked }) => marked).map(({ text }) => text.toLowerCase())),
    ];
    const reasons = self && other ? likenessReasons(self, other, words, vocabulary) : [];
    return { ...hit, reasons, verdict: judged.get(other?.caseId ?? 0) ?? null };
  });
}

type ComparedRow = Compared & { caseId: number; number: number };

async function loadCompared(caseIds: readonly number[]): Promise<ComparedRow[]> {
  if (caseIds.length === 0) return [];
  const rows = await sequelize.query<{
    caseId: number;
    number: number;
    medium: string;
    machineId: number;
    machineModel: string;
    symptoms: string | null;
    componentIds: string;
    failureModeIds: string;
  }>(
    `SELECT d.caseId, d.number, d.medium, d.machineId, m.model AS machineModel, d.componentIds, d.failureModeIds,
            (SELECT GROUP_CONCAT(s.symptomId ORDER BY s.id) FROM case_symptoms s WHERE s.caseId = d.caseId) AS symptoms
       FROM search_documents d JOIN machines m ON m.id = d.machineId
      WHERE d.kind = 'case' AND d.caseId IN (:caseIds)`,
    { replacements: { caseIds }, type: QueryTypes.SELECT },
  );
  return rows.map(({ symptoms, componentIds, failureModeIds, ...row }) => ({
    ...row,
    symptomIds: symptoms?.split(',') ?? [],
    componentIds: JSON.parse(componentIds),
    failureModeIds: JSON.parse(failureModeIds),
  }));
}

async function loadVerdicts(caseId: number): Promise<Map<number, 'confirmed' | 'dismissed'>> {
  const rows = await Likeness.findAll({ where: { [Op.or]: [{ caseId }, { otherCaseId: caseId }] } });
  return new Map(rows.map((row) => [row.caseId === caseId ? row.otherCaseId : row.caseId, row.verdict]));
}

type Judgement = {
  actor: Actor;
  number: number;
  otherNumber: number;
  verdict: 'confirmed' | 'dismissed' | null;
};

/** Confirms or dismisses a likeness, or takes the word back. It holds for both cases. */
export async function judgeLikeness(
  { actor, number, otherNumber, verdict }: Judgement,
  now: Date,
): Promise<void> {
  if (!may(actor.role, 'case:judge-likeness')) throw new Forbidden();
  await transact(async (transaction) => {
    const rows = await Case.findAll({
      where: { shopId: actor.shopId, number: [number, otherNumber] },
      order: [['id', 'ASC']],
      transaction,
    });
    const [one, other] = rows;
    if (!one || !other) throw new NotFound();
    const pair = { caseId: one.id, otherCaseId: other.id };
    await Likeness.destroy({ where: pair, transaction });
    if (verdict) {
      await Likeness.create(
        { shopId: actor.shopId, ...pair, verdict, byId: actor.userId, at: now },
        { transaction },
      );
    }
    for (const row of rows) {
      const detail = { with: row.number === number ? otherNumber : number, verdict: verdict ?? 'taken back' };
      await recordAudit(
        {
          actor,
          action: 'likeness-judged',
          subject: 'case',
          subjectId: row.id,
          caseId: row.id,
          detail,
          at: now,
        },
        transaction,
      );
    }
  });
}
