import { installDebianPackage, installPackages } from './bare-machine.mjs';

installPackages();
installDebianPackage('mariadb-server', 'mariadbd');

const { register } = await import('tsx/esm/api');
register();
const { runCommand } = await import('./commands.ts');
await runCommand(process.argv.slice(2));
