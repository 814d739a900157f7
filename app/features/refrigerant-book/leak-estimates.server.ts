import { QueryTypes } from 'sequelize';
import { type CircuitEvent, type LeakEstimate, leakEstimate } from '#app/domain/leak-rate/leak-history.ts';
import { circuitName } from '#app/domain/vocabulary/vocabulary.ts';
import { shopVocabulary } from '#app/features/catalogue/queries.server.ts';
import { sequelize } from '#db/connection.server.ts';
import { Circuit } from '#db/models/index.ts';

export type CircuitLeaks = LeakEstimate & { circuitId: number; circuitName: string };

/** What the book says of the leaks of a machine's refrigerant circuits; those without an addition are left out. */
export async function loadLeakEstimates(
  where: { machineId: number } | { id: number },
  now: Date,
): Promise<CircuitLeaks[]> {
  const circuits = await Circuit.findAll({
    where: { ...where, medium: 'refrigerant' },
    order: [['id', 'ASC']],
  });
  const [first] = circuits;
  if (!first) return [];
  const vocabulary = await shopVocabulary(first.shopId);
  const estimates: CircuitLeaks[] = [];
  for (const circuit of circuits) {
    const { id, plateChargeGrams } = circuit;
    const replacements = { circuitId: id };
    const events = await sequelize.query<CircuitEvent>(
      `SELECT v.grams, v.at, v.kind FROM movements v LEFT JOIN movements r ON r.reversesId = v.id
        WHERE v.circuitId = :circuitId AND v.kind IN ('charged', 'recovered') AND v.reversesId IS NULL AND r.id IS NULL
        ORDER BY v.at, v.id`,
      { replacements, type: QueryTypes.SELECT },
    );
    const repairs = await sequelize.query<{ at: Date }>(
      'SELECT a.at FROM repair_actions a JOIN cases c ON c.id = a.caseId WHERE c.circuitId = :circuitId ORDER BY a.at',
      { replacements, type: QueryTypes.SELECT },
    );
    const estimate = leakEstimate(
      events,
      repairs.map(({ at }) => at),
      plateChargeGrams,
      now,
    );
    if (estimate)
      estimates.push({ ...estimate, circuitId: id, circuitName: circuitName(vocabulary, circuit) });
  }
  return estimates;
}
