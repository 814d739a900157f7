import { Op } from 'sequelize';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { may } from '#app/domain/permissions/matrix.ts';
import { PHOTO_ROLE_NAMES } from '#app/domain/photos/photo-role.ts';
import { findCaseRow } from '#app/features/cases/change-case.server.ts';
import { NotFound } from '#app/features/outcome.ts';
import { Circuit, Photo } from '#db/models/index.ts';
import { mayHaveOriginal } from './access.server.ts';
import type { PhotoList, PhotoView } from './views.ts';

export const UNDO_DAYS = 30;

export async function listCasePhotos(actor: Actor, caseNumber: number): Promise<PhotoList> {
  const row = await findCaseRow(actor, caseNumber);
  return listPhotos(actor, { caseId: row.id });
}

export async function listCircuitPhotos(actor: Actor, circuitId: number): Promise<PhotoList> {
  const circuit = await Circuit.findOne({ where: { id: circuitId, shopId: actor.shopId } });
  if (!circuit) throw new NotFound();
  return listPhotos(actor, { circuitId });
}

async function listPhotos(
  actor: Actor,
  where: { caseId: number } | { circuitId: number },
): Promise<PhotoList> {
  const rows = await Photo.findAll({
    where: { ...where, shopId: actor.shopId },
    order: [
      ['position', 'ASC'],
      ['id', 'ASC'],
    ],
  });
  const views = rows.map((row) => ({ row, view: toPhotoView(actor, row) }));
  return {
    photos: views.filter(({ row }) => row.deletedAt === null).map(({ view }) => view),
    deleted: views
      .filter(({ row, view }) => row.deletedAt !== null && view.mayDelete)
      .map(({ view }) => view),
    mayAdd: may(actor.role, 'photo:add'),
  };
}

/** Photos of the shop by id, in the order of the ids; those deleted are left out. */
export async function listPhotosById(actor: Actor, ids: readonly number[]): Promise<PhotoView[]> {
  if (ids.length === 0) return [];
  const rows = await Photo.findAll({
    where: { id: { [Op.in]: [...ids] }, shopId: actor.shopId, deletedAt: null },
  });
  const byId = new Map(rows.map((row) => [row.id, row]));
  return ids.flatMap((id) => {
    const row = byId.get(id);
    return row ? [toPhotoView(actor, row)] : [];
  });
}

export function toPhotoView(actor: Actor, row: Photo): PhotoView {
  return {
    id: row.id,
    link: row.link,
    role: row.role,
    roleName: PHOTO_ROLE_NAMES[row.role],
    caption: row.caption,
    width: row.width,
    height: row.height,
    capturedAt: row.capturedAt?.toISOString() ?? null,
    capturedAtSource: row.capturedAtSource,
    uploadedByName: row.uploadedByName,
    uploadedAt: row.uploadedAt.toISOString(),
    thumb: `/photos/${row.id}/thumb`,
    medium: `/photos/${row.id}/medium`,
    original: mayHaveOriginal(actor, row) ? `/photos/${row.id}/original` : null,
    mayDelete: mayDeletePhoto(actor, row),
  };
}

/** The uploader, or the lead. */
export function mayDeletePhoto(actor: Actor, photo: Pick<Photo, 'uploadedById'>): boolean {
  return actor.role === 'lead' || (may(actor.role, 'photo:add') && photo.uploadedById === actor.userId);
}
