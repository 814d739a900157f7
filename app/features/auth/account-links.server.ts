import { sendMail } from '#app/features/mail/mail.server.ts';
import { env } from '#app/server/env.server.ts';
import { hashToken, randomToken } from '#app/server/tokens.server.ts';
import { AccountToken, Session, User } from '#db/models/index.ts';
import { transact } from '#db/transact.server.ts';
import { hashPassword } from './passwords.server.ts';

const HOUR_MS = 60 * 60_000;
const LIFETIME_MS = { reset: HOUR_MS, join: 7 * 24 * HOUR_MS } as const;
const RESETS_AN_HOUR = 3;

type Purpose = keyof typeof LIFETIME_MS;

/** Mails a link for a new password if the address belongs to an active person; says nothing about whether it does. */
export async function mailResetLink(email: string, now: Date): Promise<void> {
  const user = await User.findOne({ where: { email, active: true } });
  if (!user) return;
  const recent = await AccountToken.findAll({ where: { userId: user.id, purpose: 'reset' } });
  if (
    recent.filter(({ createdAt }) => now.getTime() - createdAt.getTime() < HOUR_MS).length >= RESETS_AN_HOUR
  )
    return;
  const link = await newAccountLink(user.id, 'reset', now);
  await sendMail({
    to: email,
    subject: 'A new password for Weepmark',
    text: `Hello ${user.name},\n\nsomebody asked for a new password for this address. If it was you, choose one here within an hour:\n\n${link}\n\nIf it was not you, leave this mail alone: nothing changes.\n`,
  });
}

/** Mails the link with which a new person chooses a password and comes in. */
export async function mailJoinLink(
  person: { id: number; email: string; name: string },
  shopName: string,
  now: Date,
) {
  const link = await newAccountLink(person.id, 'join', now);
  await sendMail({
    to: person.email,
    subject: `Join ${shopName} on Weepmark`,
    text: `Hello ${person.name},\n\n${shopName} keeps its leak cases in Weepmark and has added you. Choose a password within seven days:\n\n${link}\n`,
  });
}

async function newAccountLink(userId: number, purpose: Purpose, now: Date): Promise<string> {
  const token = randomToken();
  await AccountToken.create({
    id: hashToken(token),
    userId,
    purpose,
    createdAt: now,
    expiresAt: new Date(now.getTime() + LIFETIME_MS[purpose]),
  });
  return new URL(`/${purpose}/${token}`, env.PUBLIC_URL).href;
}

/** Whom an unused, unexpired link is for; null for any other. */
export async function findAccountLink(token: string, purpose: Purpose, now: Date) {
  const row = await AccountToken.findByPk(hashToken(token));
  if (!row || row.purpose !== purpose || row.usedAt || row.expiresAt <= now) return null;
  const user = await User.findByPk(row.userId);
  return user?.active ? { userId: user.id, name: user.name, email: user.email } : null;
}

/** Sets the password once; every session and every other link of the person ends. Answers null for a spent link. */
export async function spendPasswordLink(token: string, purpose: Purpose, password: string, now: Date) {
  const passwordHash = await hashPassword(password);
  return transact(async (transaction) => {
    const row = await AccountToken.findByPk(hashToken(token), { transaction, lock: transaction.LOCK.UPDATE });
    if (!row || row.purpose !== purpose || row.usedAt || row.expiresAt <= now) return null;
    const user = await User.findByPk(row.userId, { transaction, lock: transaction.LOCK.UPDATE });
    if (!user?.active) return null;
    await user.update({ passwordHash }, { transaction });
    await AccountToken.update({ usedAt: now }, { where: { userId: user.id, usedAt: null }, transaction });
    await Session.destroy({ where: { userId: user.id }, transaction });
    return { userId: user.id };
  });
}
