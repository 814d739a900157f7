import { Op, type Transaction } from 'sequelize';
import { z } from 'zod';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { may } from '#app/domain/permissions/matrix.ts';
import { PHOTO_ROLES } from '#app/domain/photos/photo-role.ts';
import { recordAudit } from '#app/features/audit/audit.server.ts';
import { settleCase } from '#app/features/cases/settle.server.ts';
import { Forbidden, NotFound } from '#app/features/outcome.ts';
import { Photo } from '#db/models/index.ts';
import { transact } from '#db/transact.server.ts';
import { mayDeletePhoto } from './queries.server.ts';

export const photoChangeSchema = z.discriminatedUnion('intent', [
  z.object({
    intent: z.literal('describe'),
    caption: z.string().trim().max(1000),
    role: z.enum(PHOTO_ROLES),
  }),
  z.object({ intent: z.literal('move'), by: z.enum(['up', 'down']) }),
  z.object({ intent: z.literal('delete') }),
  z.object({ intent: z.literal('restore') }),
]);
export type PhotoChange = z.infer<typeof photoChangeSchema>;

/** Changes a photo of the actor's shop; its case is settled and the history says so. */
export async function changePhoto(
  actor: Actor,
  photoId: number,
  change: PhotoChange,
  now: Date,
): Promise<Photo> {
  return transact(async (transaction) => {
    const photo = await Photo.findOne({
      where: { id: photoId, shopId: actor.shopId },
      transaction,
      lock: transaction.LOCK.UPDATE,
    });
    if (!photo) throw new NotFound();
    if (!may(actor.role, 'photo:add')) throw new Forbidden();
    const detail = await apply(actor, photo, change, now, transaction);
    await recordAudit(
      {
        actor,
        action: `photo-${PAST[change.intent]}`,
        subject: 'photo',
        subjectId: photo.id,
        caseId: photo.caseId,
        detail,
        at: now,
      },
      transaction,
    );
    if (photo.caseId !== null) await settleCase(photo.caseId, transaction);
    return photo;
  });
}

const PAST = { describe: 'described', move: 'moved', delete: 'deleted', restore: 'restored' } as const;

async function apply(actor: Actor, photo: Photo, change: PhotoChange, now: Date, transaction: Transaction) {
  switch (change.intent) {
    case 'describe': {
      const { caption, role } = change;
      await photo.update({ caption, role }, { transaction });
      return { caption, role };
    }
    case 'move':
      await swapWithNeighbour(photo, change.by, transaction);
      return { by: change.by };
    case 'delete':
      if (!mayDeletePhoto(actor, photo)) throw new Forbidden();
      await photo.update({ deletedAt: now, deletedById: actor.userId }, { transaction });
      return { sha256: photo.sha256 };
    case 'restore':
      if (!mayDeletePhoto(actor, photo)) throw new Forbidden();
      await photo.update({ deletedAt: null, deletedById: null }, { transaction });
      return {};
  }
}

/** Changes places with the photo before or after it on the same link; at the end nothing happens. */
async function swapWithNeighbour(photo: Photo, by: 'up' | 'down', transaction: Transaction): Promise<void> {
  const { caseId, circuitId, link, position } = photo;
  const neighbour = await Photo.findOne({
    where: {
      caseId,
      circuitId,
      link,
      deletedAt: null,
      position: by === 'up' ? { [Op.lt]: position } : { [Op.gt]: position },
    },
    order: [['position', by === 'up' ? 'DESC' : 'ASC']],
    transaction,
    lock: transaction.LOCK.UPDATE,
  });
  if (!neighbour) return;
  const other = neighbour.position;
  await neighbour.update({ position }, { transaction });
  await photo.update({ position: other }, { transaction });
}
