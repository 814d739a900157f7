import type { Migration } from './tables.ts';

export const migration: Migration = {
  async up({ context }) {
    await context.query('ALTER TABLE yards ADD COLUMN altitudeM INT NOT NULL DEFAULT 0');
  },
  async down({ context }) {
    await context.query('ALTER TABLE yards DROP COLUMN altitudeM');
  },
};
