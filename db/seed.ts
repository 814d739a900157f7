import { parseArgs } from 'node:util';
import { sequelize } from './connection.server.ts';
import { migrate, migrator } from './migrations.ts';
import { Shop } from './models/index.ts';

/**
 * Migrates, then loads the demo. `--first-run`: only when there is no shop yet. `--reset`: over an emptied schema.
 */
const { values } = parseArgs({ options: { 'first-run': { type: 'boolean' }, reset: { type: 'boolean' } } });
const say = (text: string) => process.stderr.write(`· ${text}\n`);

if (values.reset) await migrator(sequelize).down({ to: 0 });
await migrate(sequelize);
if (!values['first-run'] || (await Shop.count()) === 0) {
  const { seedDemo } = await import('./seeds/demo/demo.server.ts');
  await seedDemo(say);
}
await sequelize.close();
