/** The row does not exist for this actor: it is missing or another shop's. Shown as 404. */
export class NotFound extends Error {
  override name = 'NotFound';
}

/** The row exists, the role may not do this. Shown as 403. */
export class Forbidden extends Error {
  override name = 'Forbidden';
}

/** Messages beside fields; the empty key is for the form as a whole. */
export type FieldErrors = Record<string, string>;

export type Refusal =
  | { refused: 'fields'; fields: FieldErrors }
  | { refused: 'conflict'; byName: string; at: string; theirs: Record<string, string>; version: number }
  | { refused: 'gate'; gate: string; lacks: string[]; rule: string };

/** The version that a form is to carry when it is sent again: after a conflict the one that now stands. */
export function versionToSend(refusal: Refusal | undefined, version: number): number;
export function versionToSend(refusal: Refusal | undefined, version: number | undefined): number | undefined;
export function versionToSend(refusal: Refusal | undefined, version: number | undefined): number | undefined {
  return refusal?.refused === 'conflict' ? refusal.version : version;
}

export type Outcome<T = null> = { ok: true; value: T } | ({ ok: false } & Refusal);

export function done(): { ok: true; value: null };
export function done<T>(value: T): { ok: true; value: T };
export function done(value: unknown = null): { ok: true; value: unknown } {
  return { ok: true, value };
}

export function refuseFields(fields: FieldErrors): { ok: false } & Refusal {
  return { ok: false, refused: 'fields', fields };
}
