import { statements } from './tables.ts';

export const migration = statements({
  up: ['ALTER TABLE yards ADD COLUMN altitudeM INT NOT NULL DEFAULT 0'],
  down: ['ALTER TABLE yards DROP COLUMN altitudeM'],
});
