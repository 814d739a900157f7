import type { Transaction } from 'sequelize';
import { caseState, evidenceChain } from '#app/domain/chain/chain.ts';
import { shopVocabulary } from '#app/features/catalogue/queries.server.ts';
import { indexCase } from '#app/features/find/index-case.server.ts';
import { Case, Machine } from '#db/models/index.ts';
import { caseRecord, loadEvidence } from './evidence.server.ts';
import { caseTitle } from './title.ts';

/**
 * Works out chain, state and title anew after any change to a case or what hangs on it, and indexes the case for
 * finding, in the change's own transaction.
 */
export async function settleCase(caseId: number, transaction: Transaction, at = new Date()): Promise<void> {
  const row = await Case.findByPk(caseId, { transaction, rejectOnEmpty: true });
  const evidence = await loadEvidence(caseId, transaction);
  const machine = await Machine.findByPk(row.machineId, { transaction, rejectOnEmpty: true });
  const vocabulary = await shopVocabulary(row.shopId, transaction);
  const record = caseRecord(row, evidence);
  row.chain = evidenceChain(record);
  row.state = caseState(record);
  row.title = caseTitle(
    {
      complaint: row.complaint,
      symptomIds: evidence.symptoms.map(({ symptomId }) => symptomId),
      finding: evidence.findings.findLast(({ certainty }) => certainty === 'confirmed'),
      machineModel: machine.model,
    },
    vocabulary,
  );
  row.updatedAt = at;
  await row.save({ transaction });
  await indexCase({ row, evidence, machine, vocabulary }, transaction);
}
