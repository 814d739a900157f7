import { z } from 'zod';
import { LINK_KEYS } from '#app/domain/chain/chain.ts';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { may } from '#app/domain/permissions/matrix.ts';
import { parseBrowserTime } from '#app/domain/photos/capture-time.ts';
import { PHOTO_ROLES } from '#app/domain/photos/photo-role.ts';
import { findCaseRow } from '#app/features/cases/change-case.server.ts';
import { Forbidden, NotFound } from '#app/features/outcome.ts';
import { Circuit } from '#db/models/index.ts';
import { BadImage, ImagesBusy } from '#storage/images.server.ts';
import { keepPhoto } from './keep-photo.server.ts';
import { toPhotoView } from './queries.server.ts';
import { MOST_BYTES, MOST_FILES, type Received } from './receive.server.ts';
import type { PhotoView } from './views.ts';

const uploadSchema = z.object({
  caseNumber: z.coerce.number().int().positive().optional().catch(undefined),
  circuitId: z.coerce.number().int().positive().optional().catch(undefined),
  link: z.enum(['', ...LINK_KEYS]).catch(''),
  role: z.enum(PHOTO_ROLES).catch('white'),
  caption: z.string().max(1000).catch(''),
  capturedAt: z.string().catch(''),
});

export type UploadResult = { photos: PhotoView[]; errors: { file: string; error: string }[] };

/** Keeps the photos of a received form on a case or a circuit of the actor's shop; good ones are kept when others fail. */
export async function keepUploads(actor: Actor, received: Received, now: Date): Promise<UploadResult> {
  if (!may(actor.role, 'photo:add')) throw new Forbidden();
  const fields = uploadSchema.parse(received.fields);
  const on = await findTarget(actor, fields);
  const result: UploadResult = { photos: [], errors: [] };
  if (received.tooMany)
    result.errors.push({ file: '', error: `At most ${MOST_FILES} photos at a time; the rest was left out.` });
  if (received.files.length === 0 && !received.tooMany)
    result.errors.push({ file: '', error: 'Choose at least one photo.' });
  for (const file of received.files) {
    if (file.tooLarge) {
      result.errors.push({
        file: file.name,
        error: `This file is larger than ${MOST_BYTES / 1_000_000} MB.`,
      });
      continue;
    }
    if (file.bytes === 0) {
      result.errors.push({ file: file.name, error: 'This file is empty.' });
      continue;
    }
    try {
      const { link, role, caption } = fields;
      const browserTime = parseBrowserTime(fields.capturedAt, now);
      const photo = await keepPhoto({
        actor,
        on,
        link,
        role,
        caption,
        browserTime,
        file: file.path,
        sha256: file.sha256,
        now,
      });
      result.photos.push(toPhotoView(actor, photo));
    } catch (error) {
      if (!(error instanceof BadImage || error instanceof ImagesBusy)) throw error;
      result.errors.push({ file: file.name, error: error.message });
    }
  }
  return result;
}

async function findTarget(actor: Actor, { caseNumber, circuitId }: z.infer<typeof uploadSchema>) {
  if (caseNumber !== undefined) return { caseId: (await findCaseRow(actor, caseNumber)).id };
  const circuit = circuitId && (await Circuit.findOne({ where: { id: circuitId, shopId: actor.shopId } }));
  if (!circuit) throw new NotFound();
  return { circuitId: circuit.id };
}
