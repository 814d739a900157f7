import { parseArgs } from 'node:util';
import { sequelize } from '#db/connection.server.ts';
import { User } from '#db/models/index.ts';
import { issueApiToken } from './tokens.server.ts';

/** The command `npm run token -- --email someone@…`: prints a new API token for that person. */
async function printToken(): Promise<number> {
  const options = {
    email: { type: 'string' },
    name: { type: 'string', default: 'made on the command line' },
  } as const;
  const { email, name } = parseArgs({ options, strict: false }).values;
  if (typeof email !== 'string' || typeof name !== 'string') {
    process.stderr.write('Say for whom: npm run token -- --email someone@shop.example\n');
    return 2;
  }
  const user = await User.findOne({ where: { email: email.toLowerCase(), active: true } });
  if (!user) {
    process.stderr.write(`Nobody active here has the address ${email}.\n`);
    return 1;
  }
  const actor = { userId: user.id, shopId: user.shopId, role: user.role, name: user.name };
  process.stdout.write(`${await issueApiToken(actor, name.slice(0, 100), new Date())}\n`);
  return 0;
}

process.exitCode = await printToken();
await sequelize.close();
