import type { Sequelize } from 'sequelize';
import type { MigrationParams } from 'umzug';

type Step = (params: MigrationParams<Sequelize>) => Promise<void>;
export type Migration = { up: Step; down: Step };

/** A migration that creates tables, given as name → column and key definitions, and drops them in the reverse order. */
export function createTables(tables: Record<string, string>): Migration {
  return {
    async up({ context }) {
      for (const [name, definition] of Object.entries(tables)) {
        await context.query(
          `CREATE TABLE ${name} (${definition}) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci`,
        );
      }
    },
    async down({ context }) {
      for (const name of Object.keys(tables).reverse()) await context.query(`DROP TABLE IF EXISTS ${name}`);
    },
  };
}

/** A migration of plain statements, run one after the other. */
export function statements({ up, down }: { up: readonly string[]; down: readonly string[] }): Migration {
  const run =
    (all: readonly string[]): Step =>
    async ({ context }) => {
      for (const statement of all) await context.query(statement);
    };
  return { up: run(up), down: run(down) };
}
