import { Op } from 'sequelize';
import type { Viewer } from '#app/server/context.ts';
import { SESSION_DAYS, sessionCookie } from '#app/server/cookies.server.ts';
import { hashToken, randomToken } from '#app/server/tokens.server.ts';
import { Session, Shop, User } from '#db/models/index.ts';

const SEEN_EVERY_MS = 5 * 60_000;
const SESSION_MS = SESSION_DAYS * 24 * 60 * 60_000;

type NewSession = { userId: number; userAgent: string; address: string; now: Date };

/** Opens a session; the cookie carries the token, the database only its hash. */
export async function openSession({
  userId,
  userAgent,
  address,
  now,
}: NewSession): Promise<{ cookie: string }> {
  const token = randomToken();
  await Session.create({
    id: hashToken(token),
    userId,
    createdAt: now,
    lastSeenAt: now,
    expiresAt: new Date(now.getTime() + SESSION_MS),
    userAgent: userAgent.slice(0, 190),
    address: address.slice(0, 60),
  });
  await User.update({ lastSeenAt: now }, { where: { id: userId } });
  return { cookie: await sessionCookie.serialize(token) };
}

/** The viewer a request's cookie stands for: an unexpired session of an active person, or null. */
export async function findViewer(request: Request, now: Date): Promise<Viewer | null> {
  const token: unknown = await sessionCookie.parse(request.headers.get('Cookie'));
  if (typeof token !== 'string' || !token) return null;
  const session = await Session.findByPk(hashToken(token));
  if (!session || session.expiresAt <= now) return null;
  const user = await User.findByPk(session.userId);
  if (!user?.active) return null;
  const shop = await Shop.findByPk(user.shopId);
  if (!shop) return null;
  if (now.getTime() - session.lastSeenAt.getTime() > SEEN_EVERY_MS) {
    const expiresAt = new Date(now.getTime() + SESSION_MS);
    await Session.update({ lastSeenAt: now, expiresAt }, { where: { id: session.id } });
    await User.update({ lastSeenAt: now }, { where: { id: user.id } });
  }
  return {
    userId: user.id,
    shopId: user.shopId,
    role: user.role,
    name: user.name,
    email: user.email,
    shopName: shop.name,
    sessionId: session.id,
    preferences: user.preferences,
  };
}

export async function closeSession(viewer: Viewer): Promise<void> {
  await Session.destroy({ where: { id: viewer.sessionId } });
}

export async function endSessions(userId: number, exceptSessionId?: string): Promise<number> {
  return Session.destroy({
    where: { userId, ...(exceptSessionId ? { id: { [Op.ne]: exceptSessionId } } : {}) },
  });
}

export type SessionView = {
  id: string;
  current: boolean;
  userAgent: string;
  createdAt: string;
  lastSeenAt: string;
};

export async function listOwnSessions(viewer: Viewer, now: Date): Promise<SessionView[]> {
  const rows = await Session.findAll({
    where: { userId: viewer.userId, expiresAt: { [Op.gt]: now } },
    order: [['lastSeenAt', 'DESC']],
    limit: 50,
  });
  return rows.map((row) => ({
    id: row.id,
    current: row.id === viewer.sessionId,
    userAgent: row.userAgent,
    createdAt: row.createdAt.toISOString(),
    lastSeenAt: row.lastSeenAt.toISOString(),
  }));
}
