import type { RouterContextProvider } from 'react-router';
import { may } from '#app/domain/permissions/matrix.ts';
import { preferredUnits } from '#app/domain/units/preferences.ts';
import { cautionsFor, usualProofs } from '#app/domain/vocabulary/vocabulary.ts';
import { listCasePhotos } from '#app/features/photos/queries.server.ts';
import type { PhotoView } from '#app/features/photos/views.ts';
import { cylinderChoices } from '#app/features/refrigerant-book/queries.server.ts';
import { readForm } from '#app/server/forms.server.ts';
import { orRefuse, requireActor, wholeParam } from '#app/server/guards.server.ts';
import type { Circuit } from '#db/models/index.ts';
import { requireOnCase } from './change-case.server.ts';
import { linkChoices } from './choices.ts';
import { circuitVolume } from './circuit-volume.server.ts';
import { pressureTestFor } from './computed-proofs.ts';
import type { Evidence } from './evidence.server.ts';
import { chargedSinceRecovery } from './gates.server.ts';
import { listHoldTests } from './hold-tests.server.ts';
import { handleLinkAction } from './link-action.server.ts';
import { loadLinks } from './link-views.server.ts';
import { readingsSpeak } from './readings-speak.server.ts';
import type { NotedLink } from './schema.ts';

type Args = { request: Request; context: Readonly<RouterContextProvider>; params: { number: string } };

/** What the pages for readings, trace, repair, proof and charge show. */
export async function linkLoader({ context, params }: Args, link: NotedLink) {
  const viewer = requireActor(context);
  const number = wholeParam(params.number);
  const { row, evidence, vocabulary, circuit, view } = await orRefuse(loadLinks(viewer, number));
  const spoken = await readingsSpeak(row, evidence);
  const casePhotos = await listCasePhotos(viewer, number);
  const photos = { ...casePhotos, photos: casePhotos.photos.filter((photo) => photo.link === link) };
  const own = {
    photos: link === 'readings' ? photos.photos.map(photoChoice) : [],
    cylinders:
      link === 'charge' && row.medium === 'refrigerant'
        ? await cylinderChoices(viewer, circuit.refrigerant)
        : [],
  };
  return {
    number,
    medium: row.medium,
    links: view,
    lacks: row.chain.find(({ key }) => key === link)?.lacks ?? [],
    choices: linkChoices(vocabulary, row.medium, viewer.preferences, own),
    mayEdit: may(viewer.role, 'case:edit'),
    photos,
    cautions: link === 'readings' ? [] : cautionsFor(link, row.medium),
    usualProofs: link === 'proof' ? usualProofs(row.medium) : [],
    spoken,
    units: preferredUnits(viewer.preferences),
    volume: circuitVolume(circuit),
    pressureTest: link === 'proof' ? pressureTestFor(row.medium) : null,
    mayOverride: may(viewer.role, 'gate:override'),
    holdTests: link === 'proof' ? await listHoldTests(row) : [],
    remainderUnknown:
      link === 'charge' &&
      row.medium === 'refrigerant' &&
      !evidence.charges.some(({ kind }) => kind === 'recovered') &&
      !(spoken.standing && 'verdict' in spoken.standing && spoken.standing.verdict === 'empty'),
    weights: link === 'charge' && row.medium === 'refrigerant' ? chargeWeights(circuit, evidence) : null,
    backToWorkAt: row.backToWorkAt?.toISOString() ?? null,
  };
}

/** Grams by the plate and the entries: what came out, what went in since, what is still to go in. */
function chargeWeights({ plateChargeGrams }: Circuit, evidence: Pick<Evidence, 'charges'>) {
  const newest = evidence.charges.findLast(({ kind }) => kind === 'recovered');
  const charged = chargedSinceRecovery(evidence);
  return {
    recoveredGrams: newest ? Math.round(newest.amountSi * 1000) : null,
    chargedGrams: Math.round(charged),
    toGoGrams: plateChargeGrams === null ? null : Math.round(plateChargeGrams - charged),
  };
}

function photoChoice({ id, caption, roleName, uploadedAt }: PhotoView, place: number) {
  const taken = uploadedAt.slice(0, 16).replace('T', ' ');
  return { value: String(id), label: `${place + 1}: ${caption || `${roleName} photo`}, added ${taken}` };
}

export async function linkAction({ request, context, params }: Args, link: NotedLink) {
  const viewer = requireActor(context);
  const number = wholeParam(params.number);
  await orRefuse(requireOnCase(viewer, number, 'case:edit'));
  return handleLinkAction({ viewer, number, link, form: await readForm(request) });
}
