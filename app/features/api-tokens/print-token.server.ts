import { parseArgs } from 'node:util';
import { User } from '#db/models/index.ts';
import { issueApiToken } from './tokens.server.ts';

/** `npm run token -- --email someone@…`: prints a new API token for that person. Answers the exit code. */
export async function printToken(args: string[]): Promise<number> {
  const { values } = parseArgs({
    args,
    options: { email: { type: 'string' }, name: { type: 'string' } },
    strict: false,
  });
  if (typeof values.email !== 'string') {
    process.stderr.write('Say for whom: npm run token -- --email someone@example\n');
    return 2;
  }
  const user = await User.findOne({ where: { email: values.email.toLowerCase(), active: true } });
  if (!user) {
    process.stderr.write(`Nobody active here has the address ${values.email}.\n`);
    return 1;
  }
  const actor = { userId: user.id, shopId: user.shopId, role: user.role, name: user.name };
  const name = typeof values.name === 'string' ? values.name : 'made on the command line';
  process.stdout.write(`${await issueApiToken(actor, name.slice(0, 100), new Date())}\n`);
  return 0;
}
