import type { Actor } from '#app/domain/permissions/actor.ts';
import { loadLinks } from '#app/features/cases/link-views.server.ts';
import { loadCaseHead } from '#app/features/cases/queries.server.ts';
import { listCasePhotos } from '#app/features/photos/queries.server.ts';
import { renderNote } from '#app/features/write-ups/markdown.server.ts';
import { WriteUp } from '#db/models/index.ts';

/** A case as a report: every link with its entries, photos and the published note. `names` false leaves people out. */
export async function loadReport(actor: Actor, number: number, { names }: { names: boolean }) {
  const head = await loadCaseHead(actor, number);
  const { row, view } = await loadLinks(actor, number);
  const { photos } = await listCasePhotos(actor, number);
  const note = await WriteUp.findOne({ where: { caseId: row.id, state: 'published' } });
  const unsigned = <T extends { byName: string }>(entries: T[]) =>
    names ? entries : entries.map((entry) => ({ ...entry, byName: '' }));
  return {
    number: head.number,
    title: head.title,
    stateName: head.stateName,
    mediumName: head.mediumName,
    machine: `${head.machine.number} ${head.machine.label}, ${head.machine.kind}`,
    circuit: head.circuit.name,
    yardName: names ? head.yardName : '',
    technicianName: names ? head.technicianName : '',
    openedAt: head.openedAt,
    backToWorkAt: head.backToWorkAt,
    chain: head.chain,
    complaint: view.complaint,
    notes: view.notes,
    plate: view.plate,
    readings: unsigned(view.readings),
    methods: unsigned(view.methods),
    findings: unsigned(view.findings),
    repairs: unsigned(view.repairs),
    proofs: unsigned(view.proofs),
    charges: unsigned(view.charges),
    overrides: unsigned(view.overrides),
    photos: photos.map(({ id, link, roleName, caption, width, height, medium, capturedAt }) => ({
      id,
      link,
      roleName,
      caption,
      width,
      height,
      src: medium,
      capturedAt,
    })),
    note: note ? { title: note.title, html: renderNote(note.body) } : null,
  };
}
export type Report = Awaited<ReturnType<typeof loadReport>>;
