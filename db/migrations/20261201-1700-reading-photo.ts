import { statements } from './tables.ts';

/** A reading shows the photo of its gauge. */
export const migration = statements({
  up: [
    `ALTER TABLE readings
      ADD COLUMN photoId INT UNSIGNED NULL AFTER note,
      ADD KEY photoId (photoId),
      ADD CONSTRAINT readingPhoto FOREIGN KEY (photoId) REFERENCES photos (id) ON DELETE SET NULL`,
  ],
  down: ['ALTER TABLE readings DROP FOREIGN KEY readingPhoto, DROP COLUMN photoId'],
});
