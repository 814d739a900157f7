import type { Transaction } from 'sequelize';
import { z } from 'zod';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { may } from '#app/domain/permissions/matrix.ts';
import { recordAudit } from '#app/features/audit/audit.server.ts';
import { done, Forbidden, NotFound, type Outcome } from '#app/features/outcome.ts';
import { Certificate, User } from '#db/models/index.ts';
import { transact } from '#db/transact.server.ts';

const SOON_MS = 60 * 24 * 60 * 60_000;

export const certificateSchema = z.object({
  name: z
    .string({ error: 'Write what it is and its number.' })
    .trim()
    .min(1, 'Write what it is and its number.')
    .max(190, 'Use at most 190 characters.'),
  expiresOn: z
    .string()
    .trim()
    .default('')
    .refine(
      (text) => text === '' || (/^\d{4}-\d{2}-\d{2}$/.test(text) && !Number.isNaN(Date.parse(text))),
      'Write a date, or leave it empty.',
    ),
});

export type CertificateView = {
  id: number;
  name: string;
  expiresOn: string | null;
  state: 'good' | 'soon' | 'expired';
};

/** A person's certificates, the soonest to expire first. */
export async function listCertificates(
  shopId: number,
  userId: number,
  now: Date,
  transaction?: Transaction,
): Promise<CertificateView[]> {
  const rows = await Certificate.findAll({
    where: { shopId, userId },
    transaction,
    order: [
      ['expiresOn', 'ASC'],
      ['id', 'ASC'],
    ],
  });
  return rows.map(({ id, name, expiresOn }) => {
    const left = expiresOn === null ? Number.POSITIVE_INFINITY : expiresOn.getTime() - now.getTime();
    return {
      id,
      name,
      expiresOn: expiresOn?.toISOString() ?? null,
      state: left < 0 ? 'expired' : left < SOON_MS ? 'soon' : 'good',
    };
  });
}

/** The name of the certificate that a person works under at that time; empty when none is good. */
export async function certificateOf(
  { shopId, userId }: Actor,
  now: Date,
  transaction?: Transaction,
): Promise<string> {
  const certificates = await listCertificates(shopId, userId, now, transaction);
  return certificates.find(({ state }) => state !== 'expired')?.name ?? '';
}

export async function addCertificate(
  actor: Actor,
  userId: number,
  input: z.infer<typeof certificateSchema>,
): Promise<Outcome> {
  if (!may(actor.role, 'people:manage')) throw new Forbidden();
  return transact(async (transaction) => {
    const user = await User.findOne({ where: { id: userId, shopId: actor.shopId }, transaction });
    if (!user) throw new NotFound();
    const expiresOn = input.expiresOn ? new Date(`${input.expiresOn}T23:59:59Z`) : null;
    await Certificate.create({ shopId: actor.shopId, userId, name: input.name, expiresOn }, { transaction });
    const detail = { person: user.name, ...input };
    await recordAudit(
      { actor, action: 'certificate-added', subject: 'person', subjectId: userId, detail },
      transaction,
    );
    return done();
  });
}

export async function removeCertificate(
  actor: Actor,
  userId: number,
  certificateId: number,
): Promise<Outcome> {
  if (!may(actor.role, 'people:manage')) throw new Forbidden();
  return transact(async (transaction) => {
    const removed = await Certificate.destroy({
      where: { id: certificateId, userId, shopId: actor.shopId },
      transaction,
    });
    if (!removed) throw new NotFound();
    await recordAudit(
      {
        actor,
        action: 'certificate-removed',
        subject: 'person',
        subjectId: userId,
        detail: { certificateId },
      },
      transaction,
    );
    return done();
  });
}
