import type { Transaction } from 'sequelize';
import { caseFields, type Prepared, prepareDocument } from '#app/domain/search/document.ts';
import type { Vocabulary } from '#app/domain/vocabulary/vocabulary.ts';
import type { Evidence } from '#app/features/cases/evidence.server.ts';
import { sequelize } from '#db/connection.server.ts';
import { type Case, Circuit, type Machine, SearchDocument } from '#db/models/index.ts';

type Indexed = { row: Case; evidence: Evidence; machine: Machine; vocabulary: Vocabulary };

/** Writes a case's search document and postings anew, in the transaction of the change. A published note is part of it. */
export async function indexCase(
  { row, evidence, machine, vocabulary }: Indexed,
  transaction: Transaction,
): Promise<void> {
  const { symptoms, methods, findings, repairs, proofs, charges, writeUp } = evidence;
  const shownFindings = findings.filter(({ certainty }) => certainty !== 'ruled-out');
  const note = writeUp?.state === 'published' ? writeUp : null;
  const circuit = await Circuit.findByPk(row.circuitId, { transaction });
  const lines = (texts: string[]) => texts.filter(Boolean).join('\n');
  const fields = caseFields(
    {
      medium: row.medium,
      title: '',
      complaint: row.complaint,
      symptomIds: symptoms.map(({ symptomId }) => symptomId),
      findings: shownFindings,
      machine,
      circuitId: circuit?.place ?? '',
      refrigerant: circuit?.refrigerant ?? '',
      partNumbers: repairs.map(({ partNumber }) => partNumber),
      trace: lines([row.traceNote, row.readingsNote, ...methods.map((method) => method.note)]),
      repair: lines([row.repairNote, ...repairs.map((repair) => repair.note)]),
      proof: lines([row.proofNote, ...proofs.map((proof) => proof.note)]),
      charge: lines([row.chargeNote, ...charges.map((charge) => charge.note)]),
      writeUpTitle: note?.title ?? '',
      writeUp: note?.body ?? '',
    },
    vocabulary,
  );
  const prepared = prepareDocument(fields, row.medium);
  const values = {
    shopId: row.shopId,
    kind: 'case' as const,
    caseId: row.id,
    number: row.number,
    medium: row.medium,
    machineId: row.machineId,
    yardId: row.yardId,
    state: row.state,
    openedAt: row.openedAt,
    componentIds: [...new Set(shownFindings.map(({ componentId }) => componentId))],
    failureModeIds: [...new Set(shownFindings.map(({ failureModeId }) => failureModeId).filter(Boolean))],
    methodIds: [...new Set(methods.map(({ methodId }) => methodId))],
    title: row.title,
    body: lines([fields.complaint, fields.trace, fields.cause, fields.place, fields.repair, fields.writeUp]),
    prepared: preparedText(prepared),
    vector: [...prepared.terms],
    length: prepared.length,
    indexedAt: new Date(),
  };
  const where = { kind: 'case' as const, caseId: row.id };
  const before = await SearchDocument.findOne({ where, transaction, attributes: ['id'] });
  const document = before
    ? await before.update(values, { transaction })
    : await SearchDocument.create(values, { transaction });
  await writePostings(row.shopId, document.id, prepared, transaction);
}

/** The terms as words of the FULLTEXT column: concepts spelled so that the index keeps them whole. */
export function fullTextWord(term: string): string {
  return term.startsWith('~') ? `zz${term.replace(/[^a-z0-9]/g, '')}` : term.replace(/[^\p{L}\p{N}_]/gu, '_');
}

function preparedText({ terms }: Prepared): string {
  return [...terms.keys()].map(fullTextWord).join(' ');
}

async function writePostings(
  shopId: number,
  documentId: number,
  { terms }: Prepared,
  transaction: Transaction,
) {
  await sequelize.query('DELETE FROM search_terms WHERE documentId = :documentId', {
    replacements: { documentId },
    transaction,
  });
  if (terms.size === 0) return;
  const rows = [...terms].map(([term, weight]) => [shopId, term, documentId, weight]);
  const places = rows.map(() => '(?, ?, ?, ?)').join(', ');
  await sequelize.query(`INSERT INTO search_terms (shopId, term, documentId, weight) VALUES ${places}`, {
    replacements: rows.flat(),
    transaction,
  });
}
