import { data, Form, useNavigation } from 'react-router';
import { TextArea } from '#app/components/forms/field.tsx';
import { Button, ButtonLink } from '#app/components/ui/button.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { PageHeader } from '#app/components/ui/page-header.tsx';
import { importFleet, previewFleet } from '#app/features/machines/fleet-import.server.ts';
import { readForm } from '#app/server/forms.server.ts';
import { orRefuse, requirePermission } from '#app/server/guards.server.ts';
import { redirectWithToast } from '#app/server/redirects.server.ts';
import type { Route } from './+types/import.ts';

const MOST_LETTERS = 2_000_000;

export const meta: Route.MetaFunction = () => [{ title: 'Import a fleet · Weepmark' }];

export function loader({ context }: Route.LoaderArgs) {
  requirePermission(context, 'machine:import');
  return null;
}

export async function action({ request, context }: Route.ActionArgs) {
  const viewer = requirePermission(context, 'machine:import');
  const form = await readForm(request);
  const file = form.get('file');
  const csv = file instanceof File && file.size > 0 ? await file.text() : String(form.get('csv') ?? '');
  if (csv.length > MOST_LETTERS) {
    return data(
      { csv: '', preview: { fault: 'This file is too large: 2 MB at most.', ignored: [], lines: [] } },
      { status: 400 },
    );
  }
  if (form.get('intent') === 'load') {
    const result = await orRefuse(importFleet(viewer, csv, new Date()));
    if (result.loaded) return redirectWithToast('/machines', `${result.lines.length} machines loaded.`);
    return data({ csv, preview: result }, { status: 400 });
  }
  return data({ csv, preview: await orRefuse(previewFleet(viewer, csv)) });
}

export default function ImportFleet({ actionData }: Route.ComponentProps) {
  const intent = useNavigation().formData?.get('intent');
  const preview = actionData?.preview;
  const wrong = preview?.lines.filter(({ errors }) => errors.length > 0) ?? [];
  const ready = preview !== undefined && preview.fault === null && wrong.length === 0;
  return (
    <div className="space-y-6">
      <PageHeader
        title="Import a fleet"
        lead="A table of comma-separated values with one machine a line. First you see what would happen; then all of it is loaded, or nothing."
      />
      <p>
        The first line names the columns:{' '}
        <code className="figures">number, kind, make, model, serial, year, hours, yard, notes</code>. Only
        number is needed. A machine whose number exists is brought up to date.
      </p>
      {preview?.fault && (
        <Notice tone="danger" alert title="This file cannot be read">
          <p>{preview.fault}</p>
        </Notice>
      )}
      {wrong.length > 0 && (
        <Notice
          tone="danger"
          alert
          title={`${wrong.length} of ${preview?.lines.length} lines are wrong; nothing was loaded`}
        >
          <ul className="list-disc pl-5">
            {wrong.slice(0, 100).map(({ line, errors }) => (
              <li key={line}>
                Line {line}: {errors.join(' ')}
              </li>
            ))}
          </ul>
        </Notice>
      )}
      {ready && (
        <>
          <Notice title={`${preview.lines.length} machines are ready`}>
            <p>
              {preview.lines.filter(({ exists }) => !exists).length} new,{' '}
              {preview.lines.filter(({ exists }) => exists).length} brought up to date.
              {preview.ignored.length > 0 && ` Columns left out: ${preview.ignored.join(', ')}.`}
            </p>
          </Notice>
          <div className="max-h-96 overflow-auto rounded-lg border border-line" tabIndex={-1}>
            <table className="w-full text-left">
              <caption className="sr-only">What would be loaded</caption>
              <thead className="sticky top-0 bg-raised">
                <tr>
                  {['Line', 'Number', 'Kind', 'Make', 'Model', 'Yard', 'What happens'].map((heading) => (
                    <th key={heading} scope="col" className="px-3 py-2 text-sm">
                      {heading}
                    </th>
                  ))}
                </tr>
              </thead>
              <tbody>
                {preview.lines.slice(0, 500).map(({ line, machine, exists }) => (
                  <tr key={line} className="border-t border-line">
                    <td className="figures px-3 py-2">{line}</td>
                    <th scope="row" className="px-3 py-2">
                      {machine?.number}
                    </th>
                    <td className="px-3 py-2">{machine?.kind}</td>
                    <td className="px-3 py-2">{machine?.make}</td>
                    <td className="px-3 py-2">{machine?.model}</td>
                    <td className="px-3 py-2">{machine?.yard}</td>
                    <td className="px-3 py-2">{exists ? 'brought up to date' : 'new'}</td>
                  </tr>
                ))}
              </tbody>
            </table>
          </div>
          <Form method="post" className="flex flex-wrap gap-2">
            <input type="hidden" name="csv" value={actionData?.csv} />
            <Button name="intent" value="load" pending={intent === 'load'}>
              Load these machines
            </Button>
            <ButtonLink to="/machines" variant="quiet">
              Leave it
            </ButtonLink>
          </Form>
        </>
      )}
      <Form method="post" encType="multipart/form-data" className="max-w-3xl space-y-5">
        <div>
          <label htmlFor="fleet-file" className="mb-1 block font-semibold">
            File
          </label>
          <input
            id="fleet-file"
            type="file"
            name="file"
            accept=".csv,text/csv,text/plain"
            className="tap block w-full"
          />
        </div>
        <TextArea
          key={actionData?.csv}
          name="csv"
          label="Or paste it here"
          rows={8}
          defaultValue={actionData?.csv}
          spellCheck={false}
        />
        <Button
          name="intent"
          value="preview"
          variant={ready ? 'secondary' : 'primary'}
          pending={intent === 'preview'}
        >
          Show what would happen
        </Button>
      </Form>
    </div>
  );
}
