import { ButtonLink } from '#app/components/ui/button.tsx';
import { PrintButton } from '#app/components/ui/print-button.tsx';
import { CaseReport } from '#app/features/reports/components/case-report.tsx';
import { loadReport } from '#app/features/reports/report.server.ts';
import { orRefuse, requireActor, wholeParam } from '#app/server/guards.server.ts';
import type { Route } from './+types/print.ts';

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `Report on case ${loaderData?.report.number ?? ''} · Weepmark` },
];

export async function loader({ context, params }: Route.LoaderArgs) {
  const viewer = requireActor(context);
  return { report: await orRefuse(loadReport(viewer, wholeParam(params.number), { names: true })) };
}

export default function Print({ loaderData: { report } }: Route.ComponentProps) {
  return (
    <>
      <p className="mb-6 flex flex-wrap gap-2 print:hidden">
        <ButtonLink to={`/cases/${report.number}`}>Back to the case</ButtonLink>
        <PrintButton />
      </p>
      <CaseReport report={report} />
    </>
  );
}
