import { TextArea } from '#app/components/forms/field.tsx';
import type { Refusal } from '#app/features/outcome.ts';

/** After a gate's refusal: where the lead writes why it is passed all the same; others read who can. */
export function OverrideField({
  refusal,
  mayOverride,
}: {
  refusal: Refusal | undefined;
  mayOverride: boolean;
}) {
  if (refusal?.refused !== 'gate') return null;
  if (!mayOverride) return <p>The lead can pass this with a written reason.</p>;
  return (
    <TextArea
      name="override"
      label="Pass it all the same, because"
      hint="Your name and this reason stay on the record."
      rows={2}
    />
  );
}
