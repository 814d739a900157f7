import { FormErrors } from '#app/components/forms/field.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { DateTime } from '#app/components/ui/time.tsx';
import type { Refusal } from '#app/features/outcome.ts';

/** Why a form was not saved. What was typed stays in it; after a conflict, saving again keeps the typed version. */
export function RefusalNotice({ refusal }: { refusal: Refusal | undefined }) {
  if (!refusal) return null;
  switch (refusal.refused) {
    case 'fields':
      return <FormErrors errors={refusal.fields} />;
    case 'conflict':
      return (
        <Notice tone="warn" alert title={`${refusal.byName} changed this while you were writing`}>
          <p>
            At <DateTime value={refusal.at} />. Yours is still below and not saved yet. Theirs now says:
          </p>
          <dl className="mt-2 space-y-1">
            {Object.entries(refusal.theirs).map(([name, value]) => (
              <div key={name}>
                <dt className="inline text-sm text-muted">{name}: </dt>
                <dd className="inline whitespace-pre-line">{value || '(empty)'}</dd>
              </div>
            ))}
          </dl>
          <p className="mt-2">Take over what you need, then save again to keep yours.</p>
        </Notice>
      );
    case 'gate':
      return (
        <Notice tone="danger" alert title="Refused">
          <p>{refusal.rule}</p>
          <ul className="list-disc pl-5">
            {refusal.lacks.map((lack) => (
              <li key={lack}>{lack}</li>
            ))}
          </ul>
        </Notice>
      );
  }
}
