import { stemmer } from 'stemmer';
import glossary from '../vocabulary/data/glossary.json' with { type: 'json' };

/**
 * The one analyser for texts and queries. A term is a stemmed word, a code without its separators (`R-134a` → `r134a`,
 * `O-ring` → `oring`, `A/C` → `ac`), a piece of a code, or a concept of the trade's glossary (`~no-cooling`), under
 * which different words for one thing meet.
 */
export type Term = { term: string; weight: number };

/** A term where it stands in the text: [start, end) in UTF-16 units. */
export type PlacedTerm = Term & { start: number; end: number };

const LONGEST_INPUT = 60_000;
const LONGEST_TERM = 40;
const LONGEST_PHRASE = 5;
const WORD = /[\p{L}\p{N}]+(?:[-/.'’&][\p{L}\p{N}]+)*/gu;

/** How much a concept counts in a query beside the person's own word, which counts 1. */
const CONCEPT_WEIGHT = 0.6;
const PIECE_WEIGHT = 1;
/** A letter code and the number after it, read as one. */
const JOINED_WEIGHT = 0.35;
const RELATED_IN_TEXT = 0;

const STOP_WORDS = new Set(
  (
    'a an and are as at be been but by for from had has have he her his i if in into is it its me my of on or our she so than that the their them then there they this to up was we were when which who will with you your ' +
    'about above again against all am any because being below between both can cannot could did do does doing during each few further here how just more most nor only other ought own same should some such through until very what where while why would may might must shall upon whether within without also many much per via etc among however thus therefore since although though either neither'
  ).split(' '),
);
/** Words that carry meaning here although most lists stop them: "not cold", "no gas", "on and off". */
const KEPT_IN_PHRASES = new Set([
  'in',
  'on',
  'of',
  'up',
  'the',
  'and',
  'its',
  'it',
  'a',
  'at',
  'to',
  'when',
  'then',
  'as',
]);

const respelled = new Map<string, string>();
for (const { seen, means } of glossary.misspellings) respelled.set(fold(seen), fold(means));
for (const { uk, us } of glossary.spelling) respelled.set(fold(us), fold(uk));

type Phrase = { concept: string; weight: number; inText: boolean; media: readonly string[] };
const phrases = new Map<string, Phrase[]>();

for (const group of glossary.groups) {
  const concept = `~${group.id}`;
  addPhrase(group.head, { concept, weight: 1, inText: true, media: group.media });
  for (const { term, relation, weight } of group.terms) {
    addPhrase(term, { concept, weight, inText: relation !== 'related', media: group.media });
  }
}
for (const { short, long } of glossary.abbreviations) {
  const concept = `~abbr-${fold(long).replace(/\W+/g, '-')}`;
  const phrase = { concept, weight: 0.9, inText: true, media: [] };
  addPhrase(short, phrase);
  addPhrase(long, phrase);
}

function addPhrase(text: string, phrase: Phrase): void {
  const key = splitWords(text)
    .map(({ whole }) => whole)
    .join(' ');
  const known = phrases.get(key) ?? [];
  if (!known.some(({ concept }) => concept === phrase.concept)) known.push(phrase);
  phrases.set(key, known);
}

/** Lower case, without accents and with plain apostrophes. Folding twice changes nothing. */
export function fold(text: string): string {
  return text
    .normalize('NFKD')
    .replace(/\p{M}+/gu, '')
    .replaceAll('’', "'")
    .toLowerCase()
    .normalize('NFKC');
}

/** The words of a query as typed, folded, each with the term that it is looked up by. */
export function queryWords(text: string): { word: string; term: string }[] {
  return splitWords(text)
    .filter(({ folded }) => !STOP_WORDS.has(folded))
    .map(({ folded, whole }) => ({ word: folded, term: whole }));
}

type Word = { whole: string; pieces: string[]; folded: string; start: number; end: number };

function splitWords(text: string): Word[] {
  const words: Word[] = [];
  for (const match of text.slice(0, LONGEST_INPUT).matchAll(WORD)) {
    const folded = fold(match[0]).slice(0, LONGEST_TERM * 2);
    if (!folded) continue;
    words.push({ ...wordForms(folded), folded, start: match.index, end: match.index + match[0].length });
  }
  return words;
}

function wordForms(folded: string): { whole: string; pieces: string[] } {
  const plain = folded.replace(/'s$/, '').replaceAll("'", '');
  const pieces = plain.split(/[-/.&]/).filter(Boolean);
  if (pieces.length <= 1) {
    const split = /^([a-z]{1,4})(\d{2,}[a-z]{0,3})$|^(\d{2,})([a-z]{1,4})$/.exec(plain);
    return {
      whole: wordTerm(plain),
      pieces: split
        ? split
            .slice(1)
            .filter(Boolean)
            .filter((piece) => piece.length > 1)
        : [],
    };
  }
  const joined = pieces.join('');
  const isNumber = /^\d+\.\d+$/.test(plain);
  return {
    whole: isNumber ? plain : wordTerm(joined),
    pieces: isNumber ? [] : pieces.filter((piece) => piece.length > 1).map(wordTerm),
  };
}

function wordTerm(word: string): string {
  const spelled = respelled.get(word) ?? word;
  const stem = /^[a-z]+$/.test(spelled) ? stemmer(spelled) : spelled;
  return stem.slice(0, LONGEST_TERM);
}

/**
 * The terms of a text, with their places. Concepts are those that the text names itself; `medium` leaves out concepts
 * of other media.
 */
export function placedTerms(text: string, medium?: string): PlacedTerm[] {
  return termsOf(text, medium, false);
}

/** The terms of a text as it is indexed. */
export function analyse(text: string, medium?: string): Term[] {
  return termsOf(text, medium, false).map(({ term, weight }) => ({ term, weight }));
}

/** A query's terms: each mention of an own word counts 1, the strongest mention of what words stand for less. */
export function analyseQuery(text: string, medium?: string): Term[] {
  const weights = new Map<string, number>();
  for (const { term, weight } of termsOf(text, medium, true)) {
    const before = weights.get(term) ?? 0;
    weights.set(term, term.startsWith('~') ? Math.max(weight, before) : weight + before);
  }
  return [...weights].map(([term, weight]) => ({ term, weight }));
}

function termsOf(text: string, medium: string | undefined, isQuery: boolean): PlacedTerm[] {
  const words = splitWords(text);
  const terms: PlacedTerm[] = [];
  words.forEach((word, place) => {
    const { whole, pieces, folded, start, end } = word;
    if (!STOP_WORDS.has(folded)) terms.push({ term: whole, weight: 1, start, end });
    for (const piece of pieces) {
      if (piece !== whole && !STOP_WORDS.has(piece))
        terms.push({ term: piece, weight: PIECE_WEIGHT, start, end });
    }
    const next = words[place + 1];
    if (next && /^\d/.test(next.folded) && /^[a-z]{1,3}$/.test(folded) && !STOP_WORDS.has(folded)) {
      terms.push({
        term: (folded + next.whole).slice(0, LONGEST_TERM),
        weight: JOINED_WEIGHT,
        start,
        end: next.end,
      });
    }
    terms.push(...conceptsFrom(words, place, medium, isQuery));
  });
  return terms;
}

/** The concepts that begin at a word: every phrase of the glossary that stands there. */
function conceptsFrom(
  words: Word[],
  place: number,
  medium: string | undefined,
  isQuery: boolean,
): PlacedTerm[] {
  const found: PlacedTerm[] = [];
  const first = words[place];
  if (!first) return found;
  let key = '';
  for (let length = 1; length <= LONGEST_PHRASE && place + length <= words.length; length += 1) {
    const last = words[place + length - 1] as Word;
    key = length === 1 ? last.whole : `${key} ${last.whole}`;
    for (const { concept, weight, inText, media } of phrases.get(key) ?? []) {
      if (medium && media.length > 0 && !media.includes(medium)) continue;
      const share = isQuery
        ? CONCEPT_WEIGHT * weight * (inText ? 1 : 0.6)
        : inText
          ? weight
          : RELATED_IN_TEXT;
      if (share > 0) found.push({ term: concept, weight: share, start: first.start, end: last.end });
    }
    if (length === 1 && STOP_WORDS.has(first.folded) && !KEPT_IN_PHRASES.has(first.folded)) break;
  }
  return found;
}
