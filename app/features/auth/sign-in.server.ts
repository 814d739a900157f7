import { Authenticator } from 'remix-auth';
import { FormStrategy } from 'remix-auth-form';
import { Op } from 'sequelize';
import { hashToken } from '#app/server/tokens.server.ts';
import { sequelize } from '#db/connection.server.ts';
import { SignInFailure, User } from '#db/models/index.ts';
import { fieldErrors } from '../form-fields.ts';
import type { FieldErrors } from '../outcome.ts';
import { passwordMatches } from './passwords.server.ts';
import { signInSchema } from './schema.ts';

const FREE_TRIES = 5;
const LONGEST_WAIT_SECONDS = 15 * 60;
const FORGET_AFTER_MS = 24 * 60 * 60_000;
const ONE_ANSWER = 'This address and password do not go together.';

/** Why a sign-in was refused; the words are the same whether the address exists or not. */
export class SignInRefused extends Error {
  override name = 'SignInRefused';
  constructor(readonly fields: FieldErrors) {
    super('sign-in refused');
  }
}

export const authenticator = new Authenticator<{ userId: number }>();
authenticator.use(
  new FormStrategy(async ({ form, request }) => {
    const parsed = signInSchema.safeParse(Object.fromEntries(form));
    if (!parsed.success) throw new SignInRefused(fieldErrors(parsed.error));
    return checkSignIn(parsed.data, clientAddress(request), new Date());
  }),
  'password',
);

/** Failures are counted for the address typed and for the sender, so that neither can be hammered. */
async function checkSignIn(
  { email, password }: { email: string; password: string },
  sender: string,
  now: Date,
): Promise<{ userId: number }> {
  const keys = [hashToken(`address ${email}`), hashToken(`sender ${sender}`)];
  const wait = await secondsToWait(keys, now);
  if (wait > 0) {
    throw new SignInRefused({ '': `Too many tries. Wait ${inWords(wait)}, then try again.` });
  }
  const user = await User.findOne({ where: { email } });
  const matches = await passwordMatches(password, user?.passwordHash ?? null);
  if (!user?.active || !matches) {
    await countFailure(keys, now);
    throw new SignInRefused({ '': ONE_ANSWER });
  }
  await SignInFailure.destroy({ where: { id: keys[0] } });
  return { userId: user.id };
}

async function secondsToWait(keys: string[], now: Date): Promise<number> {
  const rows = await SignInFailure.findAll({ where: { id: keys } });
  const waits = rows.map(({ id, failures, lastAt }) => {
    const free = id === keys[0] ? FREE_TRIES : FREE_TRIES * 6;
    if (failures < free || now.getTime() - lastAt.getTime() > FORGET_AFTER_MS) return 0;
    const pause = Math.min(LONGEST_WAIT_SECONDS, 2 ** Math.min(failures - free + 2, 12));
    return Math.ceil(pause - (now.getTime() - lastAt.getTime()) / 1000);
  });
  return Math.max(0, ...waits);
}

async function countFailure(keys: string[], now: Date): Promise<void> {
  for (const id of keys) {
    await sequelize.query(
      `INSERT INTO sign_in_failures (id, failures, lastAt) VALUES (:id, 1, :now)
       ON DUPLICATE KEY UPDATE failures = IF(lastAt < :forget, 1, failures + 1), lastAt = VALUES(lastAt)`,
      { replacements: { id, now, forget: new Date(now.getTime() - FORGET_AFTER_MS) } },
    );
  }
  await SignInFailure.destroy({
    where: { lastAt: { [Op.lt]: new Date(now.getTime() - 7 * FORGET_AFTER_MS) } },
  });
}

function inWords(seconds: number): string {
  return seconds < 60 ? `${seconds} seconds` : `${Math.ceil(seconds / 60)} minutes`;
}

/** The sender as far as this server can see it: behind a proxy that is the proxy, so the count there is generous. */
export function clientAddress(request: Request): string {
  return request.headers.get('X-Forwarded-For')?.split(',').at(-1)?.trim() ?? 'direct';
}
