import { placedTerms } from './analyser.ts';

export type MarkedPart = { text: string; marked: boolean };

/** A text cut into parts, with those marked that stand for a term of the query: by word, by stem or by concept. */
export function markMatches(text: string, queryTerms: ReadonlySet<string>): MarkedPart[] {
  const spans = placedTerms(text)
    .filter(({ term }) => queryTerms.has(term))
    .map(({ start, end }) => ({ start, end }))
    .sort((x, y) => x.start - y.start);
  const parts: MarkedPart[] = [];
  let place = 0;
  for (const { start, end } of spans) {
    if (end <= place) continue;
    const from = Math.max(start, place);
    if (from > place) parts.push({ text: text.slice(place, from), marked: false });
    parts.push({ text: text.slice(from, end), marked: true });
    place = end;
  }
  if (place < text.length) parts.push({ text: text.slice(place), marked: false });
  return parts;
}

/** The passage of `text` with the most different terms of the query, at most about `longest` letters; its start if none. */
export function passage(text: string, queryTerms: ReadonlySet<string>, longest: number): string {
  const flat = text.replace(/\s+/g, ' ').trim();
  if (flat.length <= longest) return flat;
  const hits = placedTerms(flat).filter(({ term }) => queryTerms.has(term));
  let best = { start: 0, kinds: 0 };
  for (const { start } of hits) {
    const kinds = new Set(
      hits.filter((hit) => hit.start >= start && hit.end <= start + longest).map(({ term }) => term),
    ).size;
    if (kinds > best.kinds) best = { start, kinds };
  }
  const from = best.start <= longest / 4 ? 0 : wordStart(flat, best.start - Math.floor(longest / 4));
  const cut = flat.slice(from, from + longest);
  const whole =
    from + longest >= flat.length ? cut : cut.slice(0, Math.max(cut.lastIndexOf(' '), longest / 2));
  return `${from > 0 ? '… ' : ''}${whole}${from + longest < flat.length ? ' …' : ''}`;
}

function wordStart(text: string, place: number): number {
  const space = text.lastIndexOf(' ', place);
  return space < 0 ? 0 : space + 1;
}
