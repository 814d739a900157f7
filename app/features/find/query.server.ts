import { QueryTypes } from 'sequelize';
import { analyseQuery, queryWords, type Term } from '#app/domain/search/analyser.ts';
import { repairWord } from '#app/domain/search/spelling.ts';
import { sequelize } from '#db/connection.server.ts';
import { documentFrequencies } from './candidates.server.ts';

const REPAIRED_WEIGHT = 0.7;
const MOST_REPAIRS = 5;

export type PreparedQuery = { terms: Term[]; repaired: { from: string; to: string }[] };

/** A query's terms; words that no text of the shop knows are repaired from the words that it does. */
export async function prepareQuery(shopId: number, text: string, medium?: string): Promise<PreparedQuery> {
  const terms = analyseQuery(text, medium);
  const words = queryWords(text);
  const known = await documentFrequencies(
    shopId,
    words.map(({ term }) => term),
  );
  const repaired: PreparedQuery['repaired'] = [];
  for (const { word, term } of words.filter((one) => !known.has(one.term)).slice(0, MOST_REPAIRS)) {
    const like = await wordsLike(shopId, word);
    const to = repairWord(word, like) ?? repairWord(term, like);
    if (!to || terms.some((other) => other.term === to)) continue;
    terms.push({ term: to, weight: REPAIRED_WEIGHT });
    repaired.push({ from: word, to });
  }
  return { terms, repaired };
}

/** Words of the shop's own texts that begin like `word` and are about as long. */
async function wordsLike(shopId: number, word: string): Promise<{ word: string; count: number }[]> {
  const first = [...word][0] ?? '';
  if (!/^[a-z]$/.test(first)) return [];
  const rows = await sequelize.query<{ word: string; count: number }>(
    `SELECT term AS word, COUNT(*) AS count FROM search_terms
      WHERE shopId = :shopId AND term LIKE :beginning AND CHAR_LENGTH(term) BETWEEN :least AND :most
      GROUP BY term`,
    {
      replacements: { shopId, beginning: `${first}%`, least: word.length - 2, most: word.length + 2 },
      type: QueryTypes.SELECT,
    },
  );
  return rows.map((row) => ({ word: row.word, count: Number(row.count) }));
}
