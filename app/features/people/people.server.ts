import { Op, type Transaction } from 'sequelize';
import { type Actor, ROLE_NAMES, type Role } from '#app/domain/permissions/actor.ts';
import { may } from '#app/domain/permissions/matrix.ts';
import { recordAudit } from '#app/features/audit/audit.server.ts';
import { mailJoinLink } from '#app/features/auth/account-links.server.ts';
import { done, Forbidden, NotFound, type Outcome, refuseFields } from '#app/features/outcome.ts';
import { ApiToken, Session, Shop, User, Yard } from '#db/models/index.ts';
import { transact } from '#db/transact.server.ts';

function requireAdmin(actor: Actor): void {
  if (!may(actor.role, 'people:manage')) throw new Forbidden();
}

export async function listPeople(actor: Actor, now: Date) {
  requireAdmin(actor);
  const users = await User.findAll({
    where: { shopId: actor.shopId },
    order: [
      ['active', 'DESC'],
      ['name', 'ASC'],
    ],
  });
  const sessions = await Session.findAll({
    where: { userId: users.map(({ id }) => id), expiresAt: { [Op.gt]: now } },
    attributes: ['userId'],
  });
  return users.map(({ id, name, email, role, active, passwordHash, lastSeenAt }) => ({
    id,
    name,
    email,
    role,
    roleName: ROLE_NAMES[role],
    active,
    joined: passwordHash !== null,
    sessions: sessions.filter(({ userId }) => userId === id).length,
    lastSeenAt: lastSeenAt?.toISOString() ?? null,
  }));
}

export async function loadPerson(actor: Actor, userId: number, now: Date) {
  const person = (await listPeople(actor, now)).find(({ id }) => id === userId);
  if (!person) throw new NotFound();
  return { ...person, self: person.id === actor.userId };
}

type NewPerson = { name: string; email: string; role: Role };

/** Adds a person, who gets a mail with a link to choose a password. */
export async function addPerson(actor: Actor, { name, email, role }: NewPerson, now: Date): Promise<Outcome> {
  requireAdmin(actor);
  const created = await transact(async (transaction) => {
    if (await User.count({ where: { email }, transaction })) return null;
    const user = await User.create(
      { shopId: actor.shopId, name, email, role, createdAt: now },
      { transaction },
    );
    await recordAudit(
      {
        actor,
        action: 'person-added',
        subject: 'person',
        subjectId: user.id,
        detail: { name, role },
        at: now,
      },
      transaction,
    );
    return user;
  });
  if (!created)
    return refuseFields({ email: 'This address cannot be added. It may have an account already.' });
  await mailJoin(actor, created, now);
  return done();
}

async function mailJoin(actor: Actor, user: User, now: Date): Promise<void> {
  const shop = await Shop.findByPk(actor.shopId, { rejectOnEmpty: true });
  await mailJoinLink(user, shop.name, now);
}

/** Mails the joining link once more. */
export async function inviteAgain(actor: Actor, userId: number, now: Date): Promise<Outcome> {
  requireAdmin(actor);
  const user = await User.findOne({ where: { id: userId, shopId: actor.shopId } });
  if (!user) throw new NotFound();
  if (!user.active || user.passwordHash !== null)
    return refuseFields({ '': 'This person has come in already, or is not active.' });
  await mailJoin(actor, user, now);
  return done();
}

const LAST_ADMIN = 'The shop needs at least one active admin.';

/** Changes name and role. Their sessions stay; the new role holds from the next request. */
export async function changePerson(
  actor: Actor,
  userId: number,
  input: { name: string; role: Role },
): Promise<Outcome> {
  return changeUser(actor, userId, 'person-changed', input, async (user, transaction) => {
    if (user.role === 'admin' && input.role !== 'admin' && (await isLastAdmin(user, transaction))) {
      return refuseFields({ role: LAST_ADMIN });
    }
    await user.update(input, { transaction });
    return done();
  });
}

/** Deactivates a person, which ends their sessions and tokens at once, or lets them in again. */
export async function setActive(actor: Actor, userId: number, active: boolean, now: Date): Promise<Outcome> {
  return changeUser(
    actor,
    userId,
    active ? 'person-activated' : 'person-deactivated',
    {},
    async (user, transaction) => {
      if (!active && user.role === 'admin' && (await isLastAdmin(user, transaction)))
        return refuseFields({ '': LAST_ADMIN });
      await user.update({ active }, { transaction });
      if (!active) {
        await Session.destroy({ where: { userId }, transaction });
        await ApiToken.update({ revokedAt: now }, { where: { userId, revokedAt: null }, transaction });
      }
      return done();
    },
  );
}

export async function endPersonSessions(actor: Actor, userId: number): Promise<Outcome> {
  return changeUser(actor, userId, 'sessions-ended', {}, async (_user, transaction) => {
    await Session.destroy({ where: { userId }, transaction });
    return done();
  });
}

async function changeUser(
  actor: Actor,
  userId: number,
  action: string,
  detail: Record<string, unknown>,
  change: (user: User, transaction: Transaction) => Promise<Outcome>,
): Promise<Outcome> {
  requireAdmin(actor);
  return transact(async (transaction) => {
    const where = { id: userId, shopId: actor.shopId };
    const user = await User.findOne({ where, transaction, lock: transaction.LOCK.UPDATE });
    if (!user) throw new NotFound();
    const outcome = await change(user, transaction);
    if (!outcome.ok) return outcome;
    await recordAudit(
      { actor, action, subject: 'person', subjectId: userId, detail: { ...detail, person: user.name } },
      transaction,
    );
    return outcome;
  });
}

/** Locks the shop's admins, so that two who leave at once do not leave none. */
async function isLastAdmin(user: User, transaction: Transaction): Promise<boolean> {
  const admins = await User.findAll({
    where: { shopId: user.shopId, role: 'admin', active: true },
    transaction,
    lock: transaction.LOCK.UPDATE,
  });
  return admins.every(({ id }) => id === user.id);
}

/** Adds a yard, or sets the altitude of the one that has this name. */
export async function saveYard(
  actor: Actor,
  { name, altitude }: { name: string; altitude: number },
): Promise<Outcome> {
  requireAdmin(actor);
  return transact(async (transaction) => {
    const [yard] = await Yard.findOrCreate({ where: { shopId: actor.shopId, name }, transaction });
    await yard.update({ altitudeM: altitude }, { transaction });
    await recordAudit(
      { actor, action: 'yard-saved', subject: 'yard', subjectId: yard.id, detail: { name, altitude } },
      transaction,
    );
    return done();
  });
}
