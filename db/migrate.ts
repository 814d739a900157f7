import { sequelize } from './connection.server.ts';
import { migrate } from './migrations.ts';

const ran = await migrate(sequelize);
process.stdout.write(ran.length ? `Migrated: ${ran.join(', ')}\n` : 'The schema is up to date.\n');
await sequelize.close();
