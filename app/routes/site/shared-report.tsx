import { data } from 'react-router';
import { Day } from '#app/components/ui/time.tsx';
import { signedPhotoPath } from '#app/features/photos/access.server.ts';
import { CaseReport } from '#app/features/reports/components/case-report.tsx';
import { loadReport } from '#app/features/reports/report.server.ts';
import { findSharedReport } from '#app/features/reports/shared-reports.server.ts';
import type { Route } from './+types/shared-report.ts';

const PHOTO_LINK_MS = 60 * 60_000;

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: loaderData ? `Report on case ${loaderData.report.number} · Weepmark` : 'Report · Weepmark' },
  { name: 'robots', content: 'noindex' },
];

/** One case report for a reader without an account; people, yard and history stay out. */
export async function loader({ params }: Route.LoaderArgs) {
  const now = new Date();
  const shared = await findSharedReport(params.token, now);
  if (!shared) throw data(null, { status: 404 });
  const reader = { userId: 0, shopId: shared.shopId, role: 'tech' as const, name: '' };
  const report = await loadReport(reader, shared.number, { names: false });
  const until = new Date(Math.min(now.getTime() + PHOTO_LINK_MS, shared.expiresAt.getTime()));
  return {
    expiresAt: shared.expiresAt.toISOString(),
    report: {
      ...report,
      photos: report.photos.map((photo) => ({ ...photo, src: signedPhotoPath(photo.id, 'medium', until) })),
    },
  };
}

export default function SharedReport({ loaderData: { report, expiresAt } }: Route.ComponentProps) {
  return (
    <>
      <p className="mx-auto mb-6 max-w-3xl text-muted print:hidden">
        Shared with you until <Day value={expiresAt} />.
      </p>
      <CaseReport report={report} />
    </>
  );
}
