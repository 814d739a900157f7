import type { Sequelize } from 'sequelize';
import { SequelizeStorage, Umzug } from 'umzug';
import { migration as m0 } from './migrations/20261201-0100-shops-people.ts';
import { migration as m1 } from './migrations/20261201-0200-machines.ts';
import { migration as m2 } from './migrations/20261201-0300-cases.ts';
import { migration as m3 } from './migrations/20261201-0400-evidence.ts';
import { migration as m4 } from './migrations/20261201-0500-talk.ts';
import { migration as m5 } from './migrations/20261201-0600-write-ups.ts';
import { migration as m6 } from './migrations/20261201-0700-audit.ts';
import { migration as m7 } from './migrations/20261201-0800-photos.ts';
import { migration as m8 } from './migrations/20261201-0900-catalogue.ts';
import { migration as m9 } from './migrations/20261201-1000-search.ts';
import { migration as m10 } from './migrations/20261201-1100-yard-altitude.ts';
import { migration as m11 } from './migrations/20261201-1200-hold-tests.ts';
import { migration as m12 } from './migrations/20261201-1300-refrigerant-book.ts';
import { migration as m13 } from './migrations/20261201-1400-certificates.ts';
import { migration as m14 } from './migrations/20261201-1500-movement-circuit.ts';
import { migration as m15 } from './migrations/20261201-1600-charge-cylinder.ts';
import { migration as m16 } from './migrations/20261201-1700-reading-photo.ts';

/** In the order they run. A static list, so that a built server needs no folder to look into. */
const MIGRATIONS = {
  '20261201-0100-shops-people': m0,
  '20261201-0200-machines': m1,
  '20261201-0300-cases': m2,
  '20261201-0400-evidence': m3,
  '20261201-0500-talk': m4,
  '20261201-0600-write-ups': m5,
  '20261201-0700-audit': m6,
  '20261201-0800-photos': m7,
  '20261201-0900-catalogue': m8,
  '20261201-1000-search': m9,
  '20261201-1100-yard-altitude': m10,
  '20261201-1200-hold-tests': m11,
  '20261201-1300-refrigerant-book': m12,
  '20261201-1400-certificates': m13,
  '20261201-1500-movement-circuit': m14,
  '20261201-1600-charge-cylinder': m15,
  '20261201-1700-reading-photo': m16,
};

/** Brings the schema up to date; answers the names of the migrations it ran. MariaDB commits DDL by itself, so each is one change. */
export async function migrate(sequelize: Sequelize): Promise<string[]> {
  const done = await migrator(sequelize).up();
  return done.map(({ name }) => name);
}

export function migrator(sequelize: Sequelize) {
  return new Umzug({
    migrations: Object.entries(MIGRATIONS).map(([name, { up, down }]) => ({ name, up, down })),
    context: sequelize,
    storage: new SequelizeStorage({ sequelize, tableName: 'migrations' }),
    logger: undefined,
  });
}
