/** A text as a word of an address: lower case, plain letters and digits, hyphens between; empty when nothing is left. */
export function slugOf(text: string, longest: number): string {
  return text
    .normalize('NFKD')
    .replace(/\p{M}+/gu, '')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .slice(0, longest)
    .replace(/^-+|-+$/g, '');
}
