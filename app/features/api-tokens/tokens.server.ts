import { Op } from 'sequelize';
import { z } from 'zod';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { recordAudit } from '#app/features/audit/audit.server.ts';
import { NotFound } from '#app/features/outcome.ts';
import { hashToken, randomToken } from '#app/server/tokens.server.ts';
import { ApiToken, User } from '#db/models/index.ts';
import { transact } from '#db/transact.server.ts';

const USED_EVERY_MS = 60_000;

export const tokenNameField = z
  .string()
  .trim()
  .min(1, 'Say what the token is for.')
  .max(100, 'Use at most 100 characters.');

/** Makes a token for the actor; its text is answered once and never again. */
export async function issueApiToken(actor: Actor, name: string, now: Date): Promise<string> {
  const token = `wm_${randomToken()}`;
  await transact(async (transaction) => {
    const row = await ApiToken.create(
      { userId: actor.userId, name, hash: hashToken(token), createdAt: now },
      { transaction },
    );
    await recordAudit(
      { actor, action: 'token-issued', subject: 'api-token', subjectId: row.id, detail: { name } },
      transaction,
    );
  });
  return token;
}

export async function findTokenActor(token: string, now: Date): Promise<Actor | null> {
  const row = await ApiToken.findOne({ where: { hash: hashToken(token), revokedAt: null } });
  if (!row || (row.expiresAt && row.expiresAt <= now)) return null;
  const user = await User.findByPk(row.userId);
  if (!user?.active) return null;
  if (!row.lastUsedAt || now.getTime() - row.lastUsedAt.getTime() > USED_EVERY_MS) {
    await row.update({ lastUsedAt: now });
  }
  return { userId: user.id, shopId: user.shopId, role: user.role, name: user.name };
}

export type TokenView = { id: number; name: string; createdAt: string; lastUsedAt: string | null };

export async function listOwnTokens(actor: Actor): Promise<TokenView[]> {
  const rows = await ApiToken.findAll({
    where: { userId: actor.userId, revokedAt: { [Op.is]: null } },
    order: [['createdAt', 'DESC']],
  });
  return rows.map(({ id, name, createdAt, lastUsedAt }) => ({
    id,
    name,
    createdAt: createdAt.toISOString(),
    lastUsedAt: lastUsedAt?.toISOString() ?? null,
  }));
}

export async function revokeApiToken(actor: Actor, tokenId: number, now: Date): Promise<void> {
  await transact(async (transaction) => {
    const [changed] = await ApiToken.update(
      { revokedAt: now },
      { where: { id: tokenId, userId: actor.userId, revokedAt: null }, transaction },
    );
    if (!changed) throw new NotFound();
    await recordAudit(
      { actor, action: 'token-revoked', subject: 'api-token', subjectId: tokenId },
      transaction,
    );
  });
}
