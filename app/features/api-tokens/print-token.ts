import { sequelize } from '#db/connection.server.ts';
import { printToken } from './print-token.server.ts';

process.exitCode = await printToken(process.argv.slice(2));
await sequelize.close();
