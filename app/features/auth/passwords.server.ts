import bcrypt from 'bcryptjs';
import { env } from '#app/server/env.server.ts';

/** A hash that no password has, compared when the address is unknown so that both answers take the same time. */
const nobody = bcrypt.hash('nobody has this password', env.BCRYPT_COST);

export function hashPassword(password: string): Promise<string> {
  return bcrypt.hash(password, env.BCRYPT_COST);
}

export async function passwordMatches(password: string, hash: string | null): Promise<boolean> {
  const matches = await bcrypt.compare(password, hash ?? (await nobody));
  return hash !== null && matches;
}
