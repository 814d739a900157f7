import type { ReactNode } from 'react';
import { LinkShape } from '#app/components/chain/chain-strip.tsx';
import { Facts } from '#app/components/ui/panel.tsx';
import { DateTime, Day } from '#app/components/ui/time.tsx';
import { LINK_NAMES, LINK_STATE_NAMES, type LinkKey } from '#app/domain/chain/chain.ts';
import type { EntryView } from '#app/features/cases/link-views.server.ts';
import type { Report } from '../report.server.ts';

/** A whole case on paper. */
export function CaseReport({ report }: { report: Report }) {
  const { complaint, notes, plate } = report;
  return (
    <article className="mx-auto max-w-3xl space-y-6">
      <header className="border-b-2 border-ink pb-4">
        <p className="eyebrow">
          Case {report.number}, {report.mediumName}, {report.stateName.toLowerCase()}
        </p>
        <h1 className="text-2xl font-semibold break-words">{report.title}</h1>
        <ol className="mt-3 flex flex-wrap gap-x-4 gap-y-1 text-sm">
          {report.chain.map(({ key, state }) => (
            <li key={key} className="inline-flex items-center gap-1">
              <LinkShape state={state} small />
              {LINK_NAMES[key]}: {LINK_STATE_NAMES[state].toLowerCase()}
            </li>
          ))}
        </ol>
      </header>
      <Facts
        columns={3}
        facts={[
          { label: 'Machine', value: report.machine },
          { label: 'Circuit', value: report.circuit },
          { label: 'Yard', value: report.yardName },
          { label: 'Opened', value: <Day value={report.openedAt} /> },
          { label: 'Technician', value: report.technicianName },
          { label: 'Back to work', value: report.backToWorkAt && <Day value={report.backToWorkAt} /> },
        ]}
      />
      <Section title="Complaint">
        {complaint.text && <p className="break-words whitespace-pre-line">“{complaint.text}”</p>}
        <Facts
          columns={3}
          facts={[
            { label: 'Symptoms', value: complaint.symptoms.join(', ') },
            {
              label: 'Weather',
              value: [complaint.weather, complaint.ambientLabel].filter(Boolean).join(', '),
            },
            { label: 'Machine hours', value: complaint.hours },
          ]}
        />
      </Section>
      <LinkSection
        report={report}
        link="readings"
        title="Readings"
        entries={report.readings}
        note={notes.readings}
      />
      <LinkSection
        report={report}
        link="trace"
        title="Trace"
        entries={[...report.methods, ...report.findings]}
        note={notes.trace}
      />
      <LinkSection
        report={report}
        link="repair"
        title="Repair"
        entries={report.repairs}
        note={notes.repair}
      />
      <LinkSection report={report} link="proof" title="Proof" entries={report.proofs} note={notes.proof} />
      <LinkSection report={report} link="charge" title="Charge" entries={report.charges} note={notes.charge}>
        <Facts
          columns={3}
          facts={[
            { label: 'Plate says', value: [plate.refrigerant, plate.charge].filter(Boolean).join(', ') },
            { label: 'Oil or fluid', value: plate.oil },
          ]}
        />
      </LinkSection>
      {report.note && (
        <Section title={report.note.title}>
          {/* biome-ignore lint/security/noDangerouslySetInnerHtml: sanitised on the server */}
          <div className="prose-note" dangerouslySetInnerHTML={{ __html: report.note.html }} />
        </Section>
      )}
      {report.overrides.length > 0 && (
        <Section title="Overrides">
          <ul className="space-y-2">
            {report.overrides.map(({ id, gate, reason, lacks, byName, at }) => (
              <li key={id}>
                {gate}: {reason} ({lacks.join('; ')}) {byName && `${byName}, `}
                <DateTime value={at} />
              </li>
            ))}
          </ul>
        </Section>
      )}
      <footer className="border-t border-line pt-3 text-sm text-muted">
        A record of what was done, not a maker’s figure. Local codes and licensed people come first.
      </footer>
    </article>
  );
}

function Section({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section className="space-y-3 border-t border-line pt-4">
      <h2 className="text-lg font-semibold break-words">{title}</h2>
      {children}
    </section>
  );
}

type LinkSectionProps = {
  report: Report;
  link: LinkKey;
  title: string;
  entries: EntryView[];
  note: string;
  children?: ReactNode;
};

function LinkSection({ report, link, title, entries, note, children }: LinkSectionProps) {
  const photos = report.photos.filter((photo) => photo.link === link);
  if (entries.length === 0 && note === '' && photos.length === 0) {
    return (
      <Section title={title}>
        <p className="text-muted">Nothing recorded.</p>
      </Section>
    );
  }
  return (
    <Section title={title}>
      {children}
      <ul className="space-y-2">
        {entries.map((entry) => (
          <li key={`${entry.kind}-${entry.id}`} className="break-inside-avoid">
            <p className="figures font-semibold break-words">{entry.headline}</p>
            <p className="break-words whitespace-pre-line">
              {[...entry.lines, entry.note].filter(Boolean).join('\n')}
            </p>
            <p className="text-sm text-muted">
              {entry.byName && `${entry.byName}, `}
              <DateTime value={entry.at} />
            </p>
          </li>
        ))}
      </ul>
      {note && <p className="break-words whitespace-pre-line">{note}</p>}
      {photos.length > 0 && (
        <div className="grid grid-cols-2 gap-3">
          {photos.map((photo) => (
            <figure key={photo.id} className="break-inside-avoid">
              <img
                src={photo.src}
                alt={photo.caption || `${photo.roleName} photo`}
                width={photo.width}
                height={photo.height}
                className="h-auto w-full rounded border border-line"
              />
              <figcaption className="text-sm">
                {photo.roleName}
                {photo.caption && `: ${photo.caption}`}
                {photo.capturedAt ? (
                  <>
                    , taken <DateTime value={photo.capturedAt} />
                  </>
                ) : (
                  ', time unknown'
                )}
              </figcaption>
            </figure>
          ))}
        </div>
      )}
    </Section>
  );
}
