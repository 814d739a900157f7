import { Form, Link, useNavigation } from 'react-router';
import { TextArea, TextField } from '#app/components/forms/field.tsx';
import { PhotoStrip } from '#app/components/photos/photo-strip.tsx';
import { Button, ButtonLink } from '#app/components/ui/button.tsx';
import { Facts, Panel } from '#app/components/ui/panel.tsx';
import { DateTime } from '#app/components/ui/time.tsx';
import { LINK_NAMES } from '#app/domain/chain/chain.ts';
import { may } from '#app/domain/permissions/matrix.ts';
import { RefusalNotice } from '#app/features/cases/components/refusal-notice.tsx';
import { Standing } from '#app/features/cases/components/standing.tsx';
import { loadLinks } from '#app/features/cases/link-views.server.ts';
import { overviewAction } from '#app/features/cases/overview-action.server.ts';
import { listMachineChoices, loadCaseHead, loadTalk } from '#app/features/cases/queries.server.ts';
import { alikeCases } from '#app/features/find/alike.server.ts';
import { AlikeList } from '#app/features/find/components/alike-list.tsx';
import { listCasePhotos } from '#app/features/photos/queries.server.ts';
import { ToppedUp } from '#app/features/refrigerant-book/components/topped-up.tsx';
import { loadLeakEstimates } from '#app/features/refrigerant-book/leak-estimates.server.ts';
import { readForm } from '#app/server/forms.server.ts';
import { orRefuse, requireActor, wholeParam } from '#app/server/guards.server.ts';
import type { Route } from './+types/overview.ts';

const ALIKE_SHOWN = 5;

export async function loader({ context, params }: Route.LoaderArgs) {
  const viewer = requireActor(context);
  const number = wholeParam(params.number);
  const head = await orRefuse(loadCaseHead(viewer, number));
  const { view, row } = await loadLinks(viewer, number);
  return {
    head,
    complaint: view.complaint,
    toppedUp: (await loadLeakEstimates({ id: row.circuitId }, new Date()))[0]?.toppedUp ?? [],
    findings: view.findings,
    charges: view.charges,
    proofs: view.proofs,
    talk: await loadTalk(viewer, number),
    alike: await alikeCases(viewer, number, ALIKE_SHOWN),
    photos: (await listCasePhotos(viewer, number)).photos,
    machines: await listMachineChoices(viewer),
    may: {
      comment: may(viewer.role, 'case:comment'),
      judge: may(viewer.role, 'case:judge-likeness'),
      sameOnMine: may(viewer.role, 'case:same-on-mine'),
      park: may(viewer.role, 'case:park'),
      close: may(viewer.role, 'case:close-unsolved'),
      assign: may(viewer.role, 'case:assign'),
      share: may(viewer.role, 'case:share'),
    },
  };
}

export async function action({ request, context, params }: Route.ActionArgs) {
  const viewer = requireActor(context);
  return overviewAction(viewer, wholeParam(params.number), await readForm(request));
}

export default function Overview({ loaderData, actionData }: Route.ComponentProps) {
  const { head, complaint, findings, proofs, charges, talk, alike, photos, machines } = loaderData;
  const sent = actionData && 'form' in actionData ? actionData : undefined;
  const unfinished = head.chain.filter(({ state }) => state !== 'done');
  return (
    <div className="grid gap-x-10 gap-y-8 xl:grid-cols-[minmax(0,1fr)_21rem]">
      <div className="min-w-0 space-y-8">
        <ToppedUp toppedUp={loaderData.toppedUp} />
        <Panel title="What the operator said">
          {complaint.text ? (
            <blockquote className="max-w-prose text-lg break-words whitespace-pre-line">
              “{complaint.text}”
            </blockquote>
          ) : (
            <p className="text-muted">Nothing written down.</p>
          )}
          <div className="mt-4">
            <Facts
              columns={3}
              facts={[
                { label: 'Symptoms', value: complaint.symptoms.join(', ') },
                {
                  label: 'Weather',
                  value: [complaint.weather, complaint.ambientLabel].filter(Boolean).join(', '),
                },
                { label: 'Machine hours', value: complaint.hours?.toLocaleString('en-GB') },
              ]}
            />
          </div>
        </Panel>
        {findings.length > 0 && (
          <Panel title="What we found">
            <ul className="space-y-4">
              {findings.map((finding) => (
                <li
                  key={finding.id}
                  className="border-l-4 border-line pl-4 data-[tone=evidence]:border-glow"
                  data-tone={finding.tone}
                >
                  <p className="text-lg font-semibold break-words">{finding.headline}</p>
                  {finding.lines.map((line) => (
                    <p key={line} className="max-w-prose break-words">
                      {line}
                    </p>
                  ))}
                </li>
              ))}
            </ul>
          </Panel>
        )}
        {photos.length > 0 && (
          <Panel title="Photos">
            <PhotoStrip photos={photos} />
          </Panel>
        )}
        {(proofs.length > 0 || charges.length > 0) && (
          <Facts
            facts={[
              { label: 'Newest proof', value: proofs.at(-1)?.headline },
              { label: 'Newest charge entry', value: charges.at(-1)?.headline },
            ]}
          />
        )}
        {unfinished.length > 0 && (
          <Panel title="What it still lacks">
            <ul className="space-y-1">
              {unfinished.map(({ key, lacks }) => (
                <li key={key} className="break-words">
                  <Link
                    to={`/cases/${head.number}/${key}`}
                    className="link inline-flex min-h-11 items-center font-semibold sm:min-h-0"
                  >
                    {LINK_NAMES[key]}
                  </Link>
                  : {lacks.join(', ')}
                </li>
              ))}
            </ul>
          </Panel>
        )}
        <Comments comments={talk.comments} mayComment={loaderData.may.comment} sent={sent} />
      </div>
      <aside className="min-w-0 space-y-8">
        <Panel title="Alike">
          {alike.length === 0 ? (
            <p className="text-muted">Nothing like it yet.</p>
          ) : (
            <AlikeList hits={alike} caseNumber={head.number} mayJudge={loaderData.may.judge} />
          )}
        </Panel>
        <Panel title="Same on mine">
          {talk.sameOnMine.length === 0 && <p className="text-muted">Nobody has said so yet.</p>}
          <ul className="space-y-3">
            {talk.sameOnMine.map((same) => (
              <li key={same.id}>
                <Link to={`/machines/${same.machineId}`} className="link font-semibold">
                  {same.machineNumber}
                </Link>{' '}
                {same.machineLabel}
                {same.note && <p className="break-words whitespace-pre-line">{same.note}</p>}
                <p className="text-sm text-muted">
                  {same.byName}, <DateTime value={same.at} />
                </p>
              </li>
            ))}
          </ul>
          {loaderData.may.sameOnMine && <SameOnMineForm machines={machines} sent={sent} />}
        </Panel>
        <Standing head={head} may={loaderData.may} sent={sent} />
        <p className="flex flex-wrap gap-2">
          <ButtonLink to="history" variant="quiet">
            History
          </ButtonLink>
          <ButtonLink to="print" variant="quiet">
            Report to print
          </ButtonLink>
        </p>
      </aside>
    </div>
  );
}

type Sent = Exclude<Awaited<ReturnType<typeof overviewAction>>, Response>['data'] | undefined;

function Comments({
  comments,
  mayComment,
  sent,
}: {
  comments: Route.ComponentProps['loaderData']['talk']['comments'];
  mayComment: boolean;
  sent: Sent;
}) {
  const intent = useNavigation().formData?.get('intent');
  const mine = sent?.form === 'comment' ? sent : undefined;
  const errors = mine?.refusal.refused === 'fields' ? mine.refusal.fields : {};
  return (
    <Panel title={`Comments${comments.length > 0 ? ` (${comments.length})` : ''}`} id="comments">
      <ul className="space-y-4">
        {comments.map((comment) => (
          <li key={comment.id}>
            <p className="max-w-prose break-words whitespace-pre-line">{comment.body}</p>
            <div className="flex flex-wrap items-center gap-x-3 text-sm text-muted">
              <span>
                {comment.byName}, <DateTime value={comment.at} />
              </span>
              {comment.removable && (
                <Form method="post" preventScrollReset>
                  <input type="hidden" name="commentId" value={comment.id} />
                  <Button
                    name="intent"
                    value="remove-comment"
                    variant="quiet"
                    aria-label={`Take back the comment by ${comment.byName}`}
                  >
                    Take back
                  </Button>
                </Form>
              )}
            </div>
          </li>
        ))}
      </ul>
      {mayComment && (
        <Form
          method="post"
          className="mt-4 max-w-prose space-y-3 print:hidden"
          key={comments.length}
          noValidate
          preventScrollReset
        >
          <RefusalNotice refusal={mine?.refusal} />
          <TextArea
            name="body"
            label="Say something to the others"
            rows={3}
            defaultValue={mine?.typed.body}
            error={errors.body}
          />
          <Button name="intent" value="comment" variant="secondary" pending={intent === 'comment'}>
            Add the comment
          </Button>
        </Form>
      )}
    </Panel>
  );
}

function SameOnMineForm({
  machines,
  sent,
}: {
  machines: Route.ComponentProps['loaderData']['machines'];
  sent: Sent;
}) {
  const intent = useNavigation().formData?.get('intent');
  const mine = sent?.form === 'same-on-mine' ? sent : undefined;
  const errors = mine?.refusal.refused === 'fields' ? mine.refusal.fields : {};
  return (
    <details open={mine !== undefined} className="mt-3 print:hidden">
      <summary className="tap flex items-center font-semibold text-action">I had the same on mine</summary>
      <Form method="post" className="space-y-4 pt-2" noValidate preventScrollReset>
        <RefusalNotice refusal={mine?.refusal} />
        <TextField
          name="machine"
          label="On which machine"
          list="same-machines"
          defaultValue={mine?.typed.machine}
          error={errors.machine}
          autoComplete="off"
        />
        <datalist id="same-machines">
          {machines.map(({ id, number, label }) => (
            <option key={id} value={number}>
              {label}
            </option>
          ))}
        </datalist>
        <TextArea
          name="note"
          label="What was different"
          optional
          rows={2}
          defaultValue={mine?.typed.note}
          error={errors.note}
        />
        <Button name="intent" value="same-on-mine" variant="secondary" pending={intent === 'same-on-mine'}>
          Say so
        </Button>
      </Form>
    </details>
  );
}
