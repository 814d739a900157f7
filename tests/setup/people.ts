import type { Actor, Role } from '#app/domain/permissions/actor.ts';
import { openSession } from '#app/features/auth/sessions.server.ts';
import { Circuit, Machine, Shop, User } from '#db/models/index.ts';

let made = 0;

/** A fresh shop with one person of each role. */
export async function makeShop(name = 'Testing Plant') {
  made += 1;
  const now = new Date();
  const shop = await Shop.create({ name, slug: `shop-${made}-${process.pid}`, createdAt: now });
  const actor = async (role: Role): Promise<Actor> => {
    const email = `${role}-${made}-${process.pid}@${shop.slug}.example`;
    const user = await User.create({ shopId: shop.id, name: `${role} ${made}`, email, role, createdAt: now });
    return { userId: user.id, shopId: shop.id, role, name: user.name };
  };
  return {
    shop,
    tech: await actor('tech'),
    lead: await actor('lead'),
    office: await actor('office'),
    admin: await actor('admin'),
  };
}
export type MadeShop = Awaited<ReturnType<typeof makeShop>>;

/** A machine with a refrigerant circuit. */
export async function makeMachine(shopId: number, number = 'W01') {
  const now = new Date();
  const times = { createdAt: now, updatedAt: now };
  const machine = await Machine.create({
    shopId,
    number,
    kind: 'wheel loader',
    make: 'Varkholm',
    model: 'VL-270',
    ...times,
  });
  const circuit = await Circuit.create({
    shopId,
    machineId: machine.id,
    place: 'cab-front',
    medium: 'refrigerant',
    metering: '',
    ...times,
  });
  return { machine, circuit };
}

/** The cookie of a new session of that person. */
export async function login({ userId }: Pick<Actor, 'userId'>): Promise<string> {
  const { cookie } = await openSession({ userId, userAgent: 'test', address: 'test', now: new Date() });
  return cookie.split(';')[0] ?? '';
}
