import type { EntryKind } from './schema.ts';

/** Which entry of a kind the address asks to change (`?edit=reading-12`), or null. */
export function editedEntry(params: URLSearchParams, kind: EntryKind): number | null {
  const id = new RegExp(`^${kind}-(\\d{1,9})$`).exec(params.get('edit') ?? '')?.[1];
  return id ? Number(id) : null;
}
