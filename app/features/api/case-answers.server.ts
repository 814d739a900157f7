import type { Actor } from '#app/domain/permissions/actor.ts';
import { loadLinks } from '#app/features/cases/link-views.server.ts';
import { loadCaseHead } from '#app/features/cases/queries.server.ts';
import type { AlikeHit } from '#app/features/find/alike.server.ts';
import { type Hit, markedHtml } from '#app/features/find/hits.server.ts';
import { listCasePhotos } from '#app/features/photos/queries.server.ts';

/** A found case as the API answers it. */
export function hitAnswer(hit: Hit) {
  return {
    number: hit.number,
    externalId: hit.externalId,
    title: hit.title,
    score: hit.score,
    highlights: hit.passage.some(({ marked }) => marked) ? [markedHtml(hit.passage)] : [],
    why: hit.why,
    state: hit.state,
    cause: hit.causeLine,
  };
}

export function alikeAnswer(hit: AlikeHit) {
  return { ...hitAnswer(hit), why: hit.reasons, verdict: hit.verdict };
}

/** A whole case as the API answers it. */
export async function caseAnswer(actor: Actor, number: number) {
  const head = await loadCaseHead(actor, number);
  const { view } = await loadLinks(actor, number);
  const { photos } = await listCasePhotos(actor, number);
  const entries = (
    list: { id: number; headline: string; values: Record<string, string>; byName: string; at: string }[],
  ) => list.map(({ id, headline, values, byName, at }) => ({ id, headline, ...values, byName, at }));
  return {
    number: head.number,
    externalId: head.externalId,
    title: head.title,
    state: head.state,
    chain: head.chain,
    medium: head.medium,
    machine: { id: head.machine.id, number: head.machine.number, label: head.machine.label },
    circuit: head.circuit,
    openedAt: head.openedAt,
    backToWorkAt: head.backToWorkAt,
    technician: head.technicianName,
    complaint: view.complaint,
    notes: view.notes,
    readings: entries(view.readings),
    methods: entries(view.methods),
    findings: entries(view.findings),
    repairs: entries(view.repairs),
    proofs: entries(view.proofs),
    charges: entries(view.charges),
    writeUp: head.note,
    photos,
  };
}
