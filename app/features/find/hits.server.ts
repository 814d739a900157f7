import { QueryTypes } from 'sequelize';
import { CASE_STATE_NAMES, type CaseState } from '#app/domain/chain/chain.ts';
import { NONE_CONFIRMED } from '#app/domain/chain/evidence.ts';
import type { Term } from '#app/domain/search/analyser.ts';
import { type MarkedPart, markMatches, passage } from '#app/domain/search/marks.ts';
import { mediumName, nameOf, type Vocabulary } from '#app/domain/vocabulary/vocabulary.ts';
import { sequelize } from '#db/connection.server.ts';
import type { RankedCase } from './candidates.server.ts';

const PASSAGE_LENGTH = 220;
const NAMED_TERMS = 5;

export type Hit = {
  number: number;
  externalId: string | null;
  title: string;
  score: number;
  state: CaseState;
  stateName: string;
  mediumName: string;
  machineNumber: string;
  machineModel: string;
  openedAt: string;
  causeLine: string;
  /** Why it failed, where that is known. */
  because: string;
  passage: MarkedPart[];
  why: string[];
  photo: { src: string; alt: string } | null;
  note: { slug: string; title: string } | null;
};

type Row = {
  id: number;
  number: number;
  externalId: string | null;
  title: string;
  state: CaseState;
  medium: string;
  openedAt: Date;
  machineNumber: string;
  machineModel: string;
  body: string;
  slug: string | null;
  noteTitle: string | null;
  photoId: number | null;
  photoCaption: string | null;
  componentId: string | null;
  failureModeId: string | null;
  causeId: string | null;
};

const PHOTO_CHOICE = "FIELD(p.role, 'uv', 'white', 'part', 'port', 'gauge', 'plate')";

/** The rows of hits in their order, with photo, cause and matched passage, ready to show. */
export async function loadHits(
  hits: readonly Pick<RankedCase, 'caseId' | 'score' | 'contributions'>[],
  query: readonly Term[],
  vocabulary: Vocabulary,
): Promise<Hit[]> {
  if (hits.length === 0) return [];
  const rows = await sequelize.query<Row>(
    `SELECT c.id, c.number, c.externalId, c.title, c.state, c.medium, c.openedAt,
            m.number AS machineNumber, m.model AS machineModel, d.body, w.slug, w.title AS noteTitle,
            p.id AS photoId, p.caption AS photoCaption, f.componentId, f.failureModeId, f.causeId
       FROM cases c
       JOIN machines m ON m.id = c.machineId
       JOIN search_documents d ON d.kind = 'case' AND d.caseId = c.id
       LEFT JOIN write_ups w ON w.caseId = c.id AND w.state = 'published'
       LEFT JOIN photos p ON p.id = (SELECT p.id FROM photos p WHERE p.caseId = c.id AND p.deletedAt IS NULL
                                      ORDER BY ${PHOTO_CHOICE}, p.position LIMIT 1)
       LEFT JOIN findings f ON f.id = (SELECT f.id FROM findings f WHERE f.caseId = c.id AND f.certainty = 'confirmed'
                                        ORDER BY f.at DESC, f.id DESC LIMIT 1)
      WHERE c.id IN (:ids)`,
    { replacements: { ids: hits.map(({ caseId }) => caseId) }, type: QueryTypes.SELECT },
  );
  const byId = new Map(rows.map((row) => [row.id, row]));
  const asked = new Set(query.map(({ term }) => term));
  return hits.flatMap((hit) => {
    const row = byId.get(hit.caseId);
    return row ? [toHit(row, hit, asked, vocabulary)] : [];
  });
}

function toHit(
  row: Row,
  { score, contributions }: Pick<RankedCase, 'score' | 'contributions'>,
  asked: ReadonlySet<string>,
  vocabulary: Vocabulary,
): Hit {
  const parts = markMatches(passage(row.body, asked, PASSAGE_LENGTH), asked);
  return {
    number: row.number,
    externalId: row.externalId,
    title: row.title,
    score: Math.round(score * 1000) / 1000,
    state: row.state,
    stateName: CASE_STATE_NAMES[row.state],
    mediumName: mediumName(vocabulary, row.medium),
    machineNumber: row.machineNumber,
    machineModel: row.machineModel,
    openedAt: row.openedAt.toISOString(),
    causeLine: causeLine(row, vocabulary),
    because: row.causeId ? nameOf(vocabulary, 'cause', row.causeId) : '',
    passage: parts,
    why: whyFound(parts, contributions),
    photo:
      row.photoId === null
        ? null
        : { src: `/photos/${row.photoId}/thumb`, alt: row.photoCaption || 'Photo of the fault' },
    note: row.slug === null ? null : { slug: row.slug, title: row.noteTitle ?? '' },
  };
}

/** The cause in one line: the part, how it failed and why. */
export function causeLine(
  finding: { componentId: string | null; failureModeId: string | null; causeId: string | null },
  vocabulary: Vocabulary,
): string {
  const { componentId, failureModeId, causeId } = finding;
  if (!componentId) return '';
  const part = nameOf(vocabulary, 'component', componentId);
  if (componentId === NONE_CONFIRMED) return part;
  const failure = failureModeId ? `, ${nameOf(vocabulary, 'failure-mode', failureModeId).toLowerCase()}` : '';
  const cause = causeId ? `: ${nameOf(vocabulary, 'cause', causeId).toLowerCase()}` : '';
  return `${part}${failure}${cause}`;
}

/** In plain words: the words that matched, and those of the glossary that mean the same. */
function whyFound(parts: readonly MarkedPart[], contributions: RankedCase['contributions']): string[] {
  const words = contributions
    .filter(({ term }) => !term.startsWith('~'))
    .slice(0, NAMED_TERMS)
    .map(({ term }) => term);
  const shown = [
    ...new Set(parts.filter(({ marked }) => marked).map(({ text }) => text.toLowerCase())),
  ].slice(0, NAMED_TERMS);
  const alsoMeant = contributions.some(({ term }) => term.startsWith('~'));
  const why: string[] = [];
  if (shown.length > 0) why.push(`says ${shown.map((word) => `“${word}”`).join(', ')}`);
  else if (words.length > 0) why.push(`matches ${words.map((word) => `“${word}”`).join(', ')}`);
  if (alsoMeant) why.push('also counts words that mean the same');
  return why;
}

/** A passage as HTML text with <mark>, for the API. */
export function markedHtml(parts: readonly MarkedPart[]): string {
  const escaped = (text: string) =>
    text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;');
  return parts.map(({ text, marked }) => (marked ? `<mark>${escaped(text)}</mark>` : escaped(text))).join('');
}
