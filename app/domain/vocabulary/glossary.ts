import glossary from './data/glossary.json' with { type: 'json' };

export type GlossaryEntry = { id: string; head: string; same: string[]; near: string[]; note: string };

const ENTRIES: GlossaryEntry[] = [
  ...glossary.groups.map((group) => ({
    id: group.id,
    head: group.head,
    same: group.terms.filter(({ relation }) => relation === 'same').map(({ term }) => term),
    near: group.terms.filter(({ relation }) => relation !== 'same').map(({ term }) => term),
    note: ('note' in group && group.note) || '',
  })),
  ...glossary.abbreviations.map(({ short, long }) => ({
    id: `short-${short}`,
    head: short,
    same: [long],
    near: [],
    note: '',
  })),
].sort((x, y) => x.head.localeCompare(y.head, 'en'));

/** The trade's words with those that mean the same, all or those that hold `text`. */
export function glossaryEntries(text: string): GlossaryEntry[] {
  const asked = text.trim().toLowerCase();
  return ENTRIES.filter(({ head, same, near }) =>
    [head, ...same, ...near].some((word) => word.toLowerCase().includes(asked)),
  );
}
