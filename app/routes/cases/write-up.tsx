import { Form, useNavigation } from 'react-router';
import { TextArea } from '#app/components/forms/field.tsx';
import { Badge } from '#app/components/ui/badge.tsx';
import { Button, ButtonLink } from '#app/components/ui/button.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { Panel } from '#app/components/ui/panel.tsx';
import { DateTime } from '#app/components/ui/time.tsx';
import { RefusalNotice } from '#app/features/cases/components/refusal-notice.tsx';
import { listCasePhotos } from '#app/features/photos/queries.server.ts';
import { NoteEditor } from '#app/features/write-ups/components/note-editor.tsx';
import { noteAction } from '#app/features/write-ups/note-action.server.ts';
import { loadNoteDesk } from '#app/features/write-ups/queries.server.ts';
import { STARTING_BODY } from '#app/features/write-ups/schema.ts';
import { readForm } from '#app/server/forms.server.ts';
import { orRefuse, requireActor, wholeParam } from '#app/server/guards.server.ts';
import type { Route } from './+types/write-up.ts';

export async function loader({ context, params }: Route.LoaderArgs) {
  const viewer = requireActor(context);
  const number = wholeParam(params.number);
  const desk = await orRefuse(loadNoteDesk(viewer, number));
  return { ...desk, photos: (await listCasePhotos(viewer, number)).photos };
}

export async function action({ request, context, params }: Route.ActionArgs) {
  const viewer = requireActor(context);
  return noteAction(viewer, wholeParam(params.number), await readForm(request));
}

export default function CaseWriteUp({ loaderData, actionData }: Route.ComponentProps) {
  const { note, remarks, lacks, photos, suggestedTitle } = loaderData;
  const typed: Record<string, string> | undefined = actionData?.typed;
  const writing = !['send-back', 'withdraw'].includes(actionData?.intent ?? '');
  const inForce = note?.state === 'published';
  const missing = [...lacks.cause, ...lacks.cure];
  return (
    <div className="space-y-8">
      {note && (
        <p className="flex flex-wrap items-center gap-3">
          <Badge tone={note.state === 'sent-back' || note.state === 'withdrawn' ? 'warn' : 'action'}>
            {note.stateName}
          </Badge>
          <span className="text-muted">by {note.authorName}</span>
          {(inForce || note.state === 'withdrawn') && (
            <ButtonLink to={`/write-ups/${note.slug}`} variant="quiet">
              Read it, with its revisions
            </ButtonLink>
          )}
        </p>
      )}
      {missing.length > 0 && (
        <Notice tone="warn" title="Not ready to publish">
          <ul className="list-disc pl-5">
            {missing.map((lack) => (
              <li key={lack}>{lack}</li>
            ))}
          </ul>
        </Notice>
      )}
      {remarks.length > 0 && (
        <Panel title="Remarks of the lead">
          <ul className="space-y-3">
            {remarks.map(({ id, body, byName, at }) => (
              <li key={id}>
                <p className="max-w-prose break-words whitespace-pre-line">{body}</p>
                <p className="text-sm text-muted">
                  {byName}, <DateTime value={at} />
                </p>
              </li>
            ))}
          </ul>
        </Panel>
      )}
      {loaderData.may.write ? (
        <Panel title={note ? 'The note' : 'Write the cause-and-fix note'}>
          <NoteEditor
            key={`${note?.version ?? 0}-${typed ? 'typed' : 'kept'}`}
            title={(writing && typed?.title) || note?.title || suggestedTitle}
            body={(writing && typed?.body) || note?.body || STARTING_BODY}
            html={note?.html ?? ''}
            photoIds={
              writing && typed?.photos !== undefined
                ? typed.photos.split(',').map(Number)
                : (note?.photoIds ?? [])
            }
            photos={photos}
            version={note?.version}
            published={inForce}
            mayReview={loaderData.may.review}
            mayOverride={loaderData.may.override}
            submittable={
              !loaderData.may.review && (!note || note.state === 'draft' || note.state === 'sent-back')
            }
            refusal={writing ? actionData?.refusal : undefined}
          />
        </Panel>
      ) : note ? (
        <Panel title={note.title}>
          {/* biome-ignore lint/security/noDangerouslySetInnerHtml: sanitised on the server */}
          <div className="prose-note" dangerouslySetInnerHTML={{ __html: note.html }} />
        </Panel>
      ) : (
        <p className="text-muted">No note yet. A technician or the lead writes it.</p>
      )}
      {loaderData.may.review && note?.state === 'in-review' && (
        <WordsForm
          intent="send-back"
          title="Send it back"
          label="What is missing"
          button="Send back"
          actionData={actionData}
        />
      )}
      {loaderData.may.review && inForce && (
        <WordsForm
          intent="withdraw"
          title="Withdraw it"
          label="Why it no longer holds"
          button="Withdraw the note"
          actionData={actionData}
        />
      )}
    </div>
  );
}

type WordsFormProps = {
  intent: string;
  title: string;
  label: string;
  button: string;
  actionData: Route.ComponentProps['actionData'];
};

function WordsForm({ intent, title, label, button, actionData }: WordsFormProps) {
  const pending = useNavigation().formData?.get('intent') === intent;
  const mine = actionData?.intent === intent ? actionData : undefined;
  return (
    <Panel title={title}>
      <Form method="post" className="max-w-prose space-y-3" noValidate>
        <RefusalNotice refusal={mine?.refusal} />
        <TextArea
          name="words"
          label={label}
          rows={3}
          error={mine?.refusal.refused === 'fields' ? mine.refusal.fields.words : undefined}
        />
        <Button
          name="intent"
          value={intent}
          variant={intent === 'withdraw' ? 'danger' : 'secondary'}
          pending={pending}
        >
          {button}
        </Button>
      </Form>
    </Panel>
  );
}
