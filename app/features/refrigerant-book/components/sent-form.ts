import type { FieldErrors, Refusal } from '#app/features/outcome.ts';

/** A form of the book that came back refused, with what was typed. */
export type SentForm = { refusal: Refusal; typed: Record<string, string> } | undefined;

export function fieldsOf(sent: SentForm): { typed: Record<string, string>; wrong: FieldErrors } {
  return {
    typed: sent?.typed ?? {},
    wrong: sent?.refusal.refused === 'fields' ? sent.refusal.fields : {},
  };
}
