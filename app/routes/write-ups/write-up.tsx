import { data, Form, Link, useNavigation } from 'react-router';
import { TextArea } from '#app/components/forms/field.tsx';
import { PhotoStrip } from '#app/components/photos/photo-strip.tsx';
import { Badge } from '#app/components/ui/badge.tsx';
import { Button, ButtonLink } from '#app/components/ui/button.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { PageHeader } from '#app/components/ui/page-header.tsx';
import { Panel } from '#app/components/ui/panel.tsx';
import { DateTime, Day } from '#app/components/ui/time.tsx';
import { RefusalNotice } from '#app/features/cases/components/refusal-notice.tsx';
import { fieldErrors, formObject, typedValues } from '#app/features/form-fields.ts';
import { refuseFields } from '#app/features/outcome.ts';
import { answerFlag, flagWriteUp } from '#app/features/write-ups/commands.server.ts';
import { type ChangedPart, loadWriteUp } from '#app/features/write-ups/queries.server.ts';
import { wordsSchema } from '#app/features/write-ups/schema.ts';
import { readForm } from '#app/server/forms.server.ts';
import { orRefuse, requireActor } from '#app/server/guards.server.ts';
import { redirectWithToast } from '#app/server/redirects.server.ts';
import type { Route } from './+types/write-up.ts';

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `${loaderData?.note.title ?? 'Note'} · Weepmark` },
];

export async function loader({ context, params }: Route.LoaderArgs) {
  return { note: await orRefuse(loadWriteUp(requireActor(context), params.slug)) };
}

export async function action({ request, context, params }: Route.ActionArgs) {
  const viewer = requireActor(context);
  const { caseNumber: number, slug } = await orRefuse(loadWriteUp(viewer, params.slug));
  const form = await readForm(request);
  const intent = String(form.get('intent') ?? '');
  if (intent !== 'flag' && intent !== 'answer') throw data(null, { status: 400 });
  const flagId = Number(form.get('flagId')) || 0;
  const parsed = wordsSchema.safeParse(formObject(form));
  const target = { actor: viewer, number };
  const outcome = !parsed.success
    ? refuseFields(fieldErrors(parsed.error))
    : await orRefuse(
        intent === 'flag'
          ? flagWriteUp(target, parsed.data.words, new Date())
          : answerFlag(target, flagId, parsed.data.words, new Date()),
      );
  if (outcome.ok)
    return redirectWithToast(
      `/write-ups/${slug}`,
      intent === 'flag' ? 'The lead will look at it.' : 'Answered.',
    );
  return data({ intent, flagId, refusal: outcome, typed: typedValues(form) }, { status: 400 });
}

export default function WriteUp({ loaderData: { note }, actionData }: Route.ComponentProps) {
  const inForce = note.state === 'published';
  return (
    <div className="space-y-8">
      <PageHeader
        eyebrow={
          <>
            From{' '}
            <Link to={`/cases/${note.caseNumber}`} className="link">
              case {note.caseNumber}
            </Link>
            , machine{' '}
            <Link to={`/machines/${note.machine.id}`} className="link">
              {note.machine.label}
            </Link>
          </>
        }
        title={note.title}
        lead={
          <>
            By {note.authorName}
            {note.publishedAt && (
              <>
                , published <Day value={note.publishedAt} />
              </>
            )}
          </>
        }
        actions={
          <ButtonLink to={`/cases/${note.caseNumber}/write-up`}>
            {note.may.review ? 'Work on it' : 'Its case'}
          </ButtonLink>
        }
      />
      {!inForce && (
        <Notice tone="warn" title={`${note.stateName}, not in force`}>
          {note.withdrawnReason && <p>{note.withdrawnReason}</p>}
        </Notice>
      )}
      {/* biome-ignore lint/security/noDangerouslySetInnerHtml: sanitised on the server */}
      <div className="prose-note text-lg" dangerouslySetInnerHTML={{ __html: note.html }} />
      <PhotoStrip photos={note.photos} large />
      <p className="text-sm text-muted">
        What this shop saw and did. A guide, not the maker’s figure; local codes and licensed people come
        first.
      </p>
      <Flags note={note} actionData={actionData} />
      {note.revisions.length > 0 && (
        <Panel title="Revisions">
          <ol className="space-y-3">
            {note.revisions.map((revision) => (
              <li key={revision.number}>
                <p>
                  <span className="font-semibold">Revision {revision.number}</span>{' '}
                  <span className="text-muted">
                    by {revision.byName}, <DateTime value={revision.publishedAt} />
                  </span>
                </p>
                {revision.changes && (
                  <details>
                    <summary className="tap flex items-center text-action">What changed</summary>
                    <Changes parts={revision.changes} />
                  </details>
                )}
              </li>
            ))}
          </ol>
        </Panel>
      )}
    </div>
  );
}

function Changes({ parts }: { parts: ChangedPart[] }) {
  let place = 0;
  return (
    <p className="max-w-prose rounded-lg border border-line bg-surface p-4 break-words whitespace-pre-line">
      {parts.map(({ text, kind }) => {
        place += 1;
        if (kind === 'added') {
          return (
            <ins key={place} className="bg-action-soft font-semibold">
              {text}
            </ins>
          );
        }
        if (kind === 'removed') {
          return (
            <del key={place} className="bg-danger-soft">
              {text}
            </del>
          );
        }
        return <span key={place}>{text}</span>;
      })}
    </p>
  );
}

type FlagsProps = {
  note: Route.ComponentProps['loaderData']['note'];
  actionData: Route.ComponentProps['actionData'];
};

function Flags({ note, actionData }: FlagsProps) {
  const intent = useNavigation().formData?.get('intent');
  const sent = (name: string, id = 0) =>
    actionData?.intent === name && (name === 'flag' || actionData.flagId === id) ? actionData : undefined;
  const wrong = (name: string, id = 0) => {
    const refusal = sent(name, id)?.refusal;
    return refusal?.refused === 'fields' ? refusal.fields.words : undefined;
  };
  if (note.state !== 'published' && note.flags.length === 0) return null;
  return (
    <Panel title="Is something wrong here?" lead="Anyone may point out an error. The lead answers.">
      <ul className="space-y-5">
        {note.flags.map((flag) => (
          <li key={flag.id} className="border-l-4 border-line pl-4">
            <p className="max-w-prose break-words whitespace-pre-line">{flag.body}</p>
            <p className="text-sm text-muted">
              {flag.byName}, <DateTime value={flag.at} />
            </p>
            {flag.answeredAt ? (
              <div className="mt-2">
                <p className="max-w-prose break-words whitespace-pre-line">
                  <Badge>Answer</Badge> {flag.answer}
                </p>
                <p className="text-sm text-muted">
                  {flag.answeredByName}, <DateTime value={flag.answeredAt} />
                </p>
              </div>
            ) : note.may.review ? (
              <Form method="post" className="mt-2 max-w-prose space-y-3" noValidate>
                <input type="hidden" name="flagId" value={flag.id} />
                <RefusalNotice refusal={sent('answer', flag.id)?.refusal} />
                <TextArea name="words" label="Your answer" rows={2} error={wrong('answer', flag.id)} />
                <Button name="intent" value="answer" variant="secondary" pending={intent === 'answer'}>
                  Answer
                </Button>
              </Form>
            ) : (
              <p className="mt-1 text-sm">No answer yet.</p>
            )}
          </li>
        ))}
      </ul>
      {note.may.flag && note.state === 'published' && (
        <Form method="post" className="mt-5 max-w-prose space-y-3" key={note.flags.length} noValidate>
          <RefusalNotice refusal={sent('flag')?.refusal} />
          <TextArea
            name="words"
            label="What is wrong"
            rows={2}
            defaultValue={sent('flag')?.typed.words}
            error={wrong('flag')}
          />
          <Button name="intent" value="flag" variant="secondary" pending={intent === 'flag'}>
            Point it out
          </Button>
        </Form>
      )}
    </Panel>
  );
}
