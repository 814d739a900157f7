import { data } from 'react-router';
import { EmptyState } from '#app/components/ui/empty-state.tsx';
import { DateTime } from '#app/components/ui/time.tsx';
import { listMailbox } from '#app/features/mail/mailbox.server.ts';
import type { Route } from './+types/mailbox.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Mailbox · Weepmark' }];

export async function loader() {
  const mails = await listMailbox();
  if (!mails) throw data(null, { status: 404 });
  return { mails: mails.map((mail) => ({ ...mail, parts: linkParts(mail.text) })) };
}

function linkParts(text: string) {
  return text.split(/(https?:\/\/\S+)/).map((part, place) => ({ place, part, isLink: place % 2 === 1 }));
}

export default function Mailbox({ loaderData: { mails } }: Route.ComponentProps) {
  return (
    <div className="mx-auto w-full max-w-2xl space-y-6">
      <h1 className="text-2xl font-semibold">Mailbox</h1>
      <p className="text-muted">Mail that this copy of Weepmark has sent. It stays on this machine.</p>
      {mails.length === 0 && (
        <EmptyState title="No mail yet">Ask for a new password to see one arrive.</EmptyState>
      )}
      {mails.map((mail) => (
        <article key={mail.id} className="space-y-2 border-t border-line pt-4">
          <h2 className="font-semibold">{mail.subject}</h2>
          <p className="text-sm text-muted">
            To {mail.to}, <DateTime value={mail.receivedAt} />
          </p>
          <p className="whitespace-pre-line break-words">
            {mail.parts.map(({ place, part, isLink }) =>
              isLink ? (
                <a key={place} href={part} className="link">
                  {part}
                </a>
              ) : (
                part
              ),
            )}
          </p>
        </article>
      ))}
    </div>
  );
}
